import { isFinite3, type Vec3 } from '../../maths/vec3.js';
import type { DxfThing } from './dxf-groups.js';
import { plainNumber } from './text-lines.js';

/**
 * Faces of a MESH entity at its coarsest level: 92 and the vertices, then 93 and a flat list (90) of count, index, index, ...
 * with indices from 0. null where an index leads nowhere or a number is not finite.
 */
export function meshLoops(thing: DxfThing): readonly (readonly Vec3[])[] | null {
  const points: Vec3[] = [];
  const list: number[] = [];
  let [x, y] = [Number.NaN, Number.NaN];
  // What follows 94 are edges and creases.
  let inFaces = false;
  for (const { code, text } of thing.groups) {
    const value = plainNumber(text);
    if (code === 93) inFaces = true;
    if (code === 94) break;
    if (code === 10) x = value;
    if (code === 20) y = value;
    if (code === 30) points.push([x, y, value]);
    if (code === 90 && inFaces) list.push(value);
  }
  const loops: Vec3[][] = [];
  for (let i = 0; i < list.length; ) {
    const count = list[i]!;
    const loop = list.slice(i + 1, i + 1 + count).map((index) => points[index]);
    if (!(count >= 3) || loop.length !== count || loop.some((p) => !p || !isFinite3(p))) return null;
    loops.push(loop as Vec3[]);
    i += count + 1;
  }
  return loops;
}
