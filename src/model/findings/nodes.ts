import { entry, num } from './entry.js';

/** Findings on node connectors. */
export const NODE_FINDINGS = {
  'bars-too-close': entry(
    'stop',
    'node',
    'deg',
    (f) =>
      `${f.about?.['a']} and ${f.about?.['b']} leave at ${num(f.value, 1)}°, less than the ${num(f.limit, 1)}° that two sockets need; move a node or merge the struts`,
  ),
  'node-too-large': entry(
    'stop',
    'node',
    'mm',
    (f) =>
      `${num(f.value, 1)} mm across, larger than the printer's ${num(f.limit, 1)} mm in any orientation; use a larger printer or thinner struts`,
    { withholds: true },
  ),
  'mesh-open': entry('stop', 'node', '', (f) => `its mesh is not closed (${num(f.value, 0)} open edges)`, {
    waivable: false,
    withholds: true,
  }),
  'wall-thin': entry(
    'stop',
    'node',
    'mm',
    (f) => `wall of ${num(f.value, 2)} mm at ${f.about?.['where']}, least ${num(f.limit, 2)} mm for this process`,
    { withholds: true },
  ),
  'bores-meet': entry(
    'stop',
    'node',
    'mm',
    (f) =>
      `${(f.value ?? 0) > 0 ? `only ${num(f.value, 2)} mm is left` : 'nothing is left'} between the bores of ${f.about?.['a']} and ${f.about?.['b']}, least ${num(f.limit, 2)} mm for this process; raise nodes.gap_mm or leave it out`,
    { withholds: true },
  ),
  'section-weak': entry(
    'warn',
    'node',
    'mm²',
    (f) =>
      `the section ${f.about?.['where'] === 'core' ? 'through its core' : 'behind the stop'} square to ${f.about?.['strut']} has ${num(f.value, 0)} mm², less than the ${num(f.limit, 0)} mm² of ${f.about?.['where'] === 'core' ? 'its largest sleeve' : 'that sleeve'}; give it a thicker wall or more gap`,
  ),
  'node-material-unknown': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `node material "${f.about?.['material']}" is not in the catalogue or the job; name a known one or add it under "materials"`,
  ),
  'node-system-unknown': entry(
    'stop',
    'node',
    '',
    (f) => `node system "${f.about?.['system']}" is not available; name another under "nodes"`,
  ),
  'solid-failed': entry(
    'stop',
    'node',
    '',
    (f) => `its solid could not be made (${f.about?.['what']}); change its setbacks or wall a little`,
    { waivable: false, withholds: true },
  ),
  'pin-meets-bore': entry(
    'warn',
    'node',
    'mm',
    (f) =>
      `no place for a ${num(f.value, 1)} mm pin across the socket of ${f.about?.['strut']} that misses every other bore; it has no pin hole`,
  ),
  'vent-left-out': entry(
    'note',
    'node',
    '',
    (f) => `the socket of ${f.about?.['strut']} has no vent: every way out meets another bore; use little glue there`,
  ),
  'drain-narrowed': entry(
    'note',
    'node',
    'mm',
    (f) =>
      `the hole at the floor of the socket of ${f.about?.['strut']} is ${num(f.value, 1)} mm wide, not the ${num(f.limit, 1)} mm that powder runs out by: a wider one would meet another bore; blow that socket out`,
  ),
  'mark-left-out': entry(
    'note',
    'node',
    '',
    (f) => `no room to engrave ${f.about?.['marks']}; write by hand what is missing`,
  ),
  'much-overhang': entry(
    'note',
    'node',
    '',
    (f) =>
      `${num((f.value ?? 0) * 100, 0)} % of its surface overhangs steeper than 45° in the best orientation; print it with supports`,
  ),
  'clearance-not-measured': entry(
    'note',
    'truss',
    'mm',
    (f) =>
      `the sockets' clearance for ${f.about?.['sections']} (${num(f.value, 2)} mm) is a starting value and not measured; print the fit gauge and enter what fits under nodes.clearances`,
  ),
  'strut-through-plate': entry(
    'stop',
    'node',
    '',
    (f) =>
      `${f.about?.['strut']} falls too steeply to leave over the base plate; give this node another system or raise it`,
  ),
  'drop-in-blocked': entry(
    'stop',
    'node',
    '',
    (f) =>
      `no side of the socket of ${f.about?.['strut']} is free for a strut to be laid in; use a slide there, or a drop-in at its other end`,
  ),
  'bore-not-round': entry(
    'stop',
    'node',
    '',
    (f) => `${f.about?.['strut']} is not round and cannot go into a drilled hole; give this node another system`,
  ),
  'ball-too-small': entry(
    'stop',
    'node',
    'mm',
    (f) => `a ball of ${num(f.value, 1)} mm does not hold its bores; it needs ${num(f.limit, 1)} mm`,
  ),
  'cube-too-small': entry(
    'stop',
    'node',
    'mm',
    (f) => `a cube of ${num(f.value, 1)} mm does not hold its bores; it needs ${num(f.limit, 1)} mm`,
  ),
  'rim-over-edge': entry(
    'stop',
    'node',
    'mm',
    (f) =>
      `the bore of ${f.about?.['strut']} leaves too near to an edge of the cube: ${f.value === null ? 'no size takes' : `only an edge of ${num(f.value, 1)} mm would take`} its rim on one face, and ${num(f.limit, 1)} mm is the most; give this node the system drilled-ball or socket`,
  ),
  'clamp-not-screwed': entry(
    'stop',
    'node',
    '',
    (f) =>
      `room for ${num(f.value, 0)} screws between its struts, and a clamp needs ${num(f.limit, 0)}; give this node another system`,
    { withholds: true },
  ),
} as const;
