import type { Truss } from '../../model/truss.js';

/** The truss as OBJ in mm, z up: an object a strut (a line) and a face, named by its mark, groups as layers. */
export function writeTrussObj(truss: Truss): string {
  const index = new Map(truss.nodes.map((n, i) => [n.mark, i + 1]));
  const out = ['# mm, z up'];
  for (const n of truss.nodes) out.push(`# ${n.mark}`, `v ${n.at.join(' ')}`);
  for (const m of truss.members)
    out.push(`o ${m.mark}`, `g ${layerName(m.group ?? 'STRUTS')}`, `l ${m.ends.map((e) => index.get(e)).join(' ')}`);
  for (const f of truss.faces)
    out.push(`o ${f.mark}`, `g ${layerName(f.group ?? 'FACES')}`, `f ${f.nodes.map((n) => index.get(n)).join(' ')}`);
  return `${out.join('\n')}\n`;
}

/**
 * A group as the name of a layer: letters, digits, space, $ - _ alone (AutoCAD DXF reference, symbol names), 31 characters at
 * most; anything else becomes _.
 */
export const layerName = (group: string): string =>
  group
    .replace(/[^A-Za-z0-9 $_-]/g, '_')
    .trim()
    .slice(0, 31) || '_';
