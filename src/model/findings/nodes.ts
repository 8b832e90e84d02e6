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
} as const;
