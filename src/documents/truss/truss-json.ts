import type { Truss } from '../../model/truss.js';

/** A truss as a file of the format strutwright-truss/1, in mm and N, one node, strut or face a line. What is not known is left out. */
export function writeTrussJson(truss: Truss): string {
  const list = (name: string, items: readonly object[]): string[] =>
    items.length === 0 && name !== 'nodes' && name !== 'members'
      ? []
      : [`  "${name}": [${items.length > 0 ? `\n${items.map((i) => `    ${line(i)}`).join(',\n')}\n  ` : ''}]`];
  const parts = [
    '  "format": "strutwright-truss/1"',
    '  "units": "mm"',
    ...list(
      'nodes',
      truss.nodes.map((n) => ({ id: n.mark, at: n.at })),
    ),
    ...list(
      'members',
      truss.members.map((m) => ({
        id: m.mark,
        ends: m.ends,
        force: m.force,
        section: m.section,
        area_mm2: m.area,
        modulus_MPa: m.modulus,
        roll_deg: m.roll === null ? null : (m.roll * 180) / Math.PI,
        group: m.group,
      })),
    ),
    ...list(
      'faces',
      truss.faces.map((f) => ({ id: f.mark, nodes: f.nodes, panel: f.panel || null, group: f.group })),
    ),
    ...list(
      'cells',
      truss.cells.map((c) => ({ id: c.mark, faces: c.faces })),
    ),
    ...(truss.reciprocal ? [`  "reciprocal": ${line(truss.reciprocal)}`] : []),
    ...list(
      'supports',
      truss.supports.map((s) => ({
        node: s.node,
        fixed: (['x', 'y', 'z'] as const).filter((axis) => s.fixed[axis]).join(''),
      })),
    ),
    ...list('loads', truss.loads),
  ];
  return `{\n${parts.join(',\n')}\n}\n`;
}

/** An item on one line, nulls left out, with spaces where people read. */
function line(item: unknown): string {
  if (Array.isArray(item)) return `[${item.map(line).join(', ')}]`;
  if (item === null || typeof item !== 'object') return JSON.stringify(item);
  const entries = Object.entries(item).filter(([, v]) => v !== null && v !== undefined);
  return `{ ${entries.map(([key, v]) => `${JSON.stringify(key)}: ${line(v)}`).join(', ')} }`;
}
