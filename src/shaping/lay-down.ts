import { frameToWorld, invertRigid, type Mat4, multiply4, translation } from '../maths/mat4.js';
import { cross, type Vec3 } from '../maths/vec3.js';
import type { ShapedPiece } from '../model/shaped.js';
import type { Bench, Manifold } from './kernel.js';
import type { Lie } from './orientation.js';
import { isSpeck, tidy } from './tidy.js';

/** Within this of the bed, mm, a vertex is put on it: single precision leaves 1e-5. */
const SNAP = 2e-4;
const STEEPEST = Math.SQRT1_2;

/**
 * Turns a solid (relative to `at` in the truss's axes) as it is printed, puts it on the bed, rounds it to single precision and
 * cleans it. null where cleaning would drop more than specks.
 */
export function layDown(bench: Bench, solid: Manifold, lie: Lie, at: Vec3, piece: string): ShapedPiece | null {
  const turn = invertRigid(frameToWorld([0, 0, 0], lie.level, cross(lie.up, lie.level)));
  const turned = bench.hold(solid.transform(columns(turn)), 'turned');
  const { min } = turned.boundingBox();
  const move = translation([-min[0], -min[1], -min[2]]);
  const laid = bench.hold(turned.translate([-min[0], -min[1], -min[2]]), 'laid down');
  bench.free(turned);
  const { solid: clean, dropped } = tidy(bench, laid, (v) => {
    for (let i = 2; i < v.length; i += 3) if (Math.abs(v[i]!) < SNAP) v[i] = 0;
  });
  bench.free(laid);
  if (!isSpeck(dropped) || clean.isEmpty()) return null;
  const mesh = clean.getMesh();
  const box = clean.boundingBox();
  const volume = clean.volume();
  bench.free(clean);
  const positions = Float32Array.from(mesh.vertProperties);
  const triangles = Uint32Array.from(mesh.triVerts);
  return {
    piece,
    positions,
    triangles,
    volume,
    box: [box.max[0], box.max[1], box.max[2]],
    placement: multiply4(translation(at), invertRigid(multiply4(move, turn))),
    ...undersides(positions, triangles),
  };
}

/** Kernel's order: columns. */
type Columns = [
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
  number,
];
const columns = (m: Mat4): Columns =>
  Array.from({ length: 16 }, (_, i) => m[4 * (i % 4) + Math.floor(i / 4)]!) as Columns;

function undersides(p: Float32Array, t: Uint32Array): { contact: number; overhang: number } {
  let [contact, overhang, total] = [0, 0, 0];
  for (let i = 0; i < t.length; i += 3) {
    const [a, b, c] = [3 * t[i]!, 3 * t[i + 1]!, 3 * t[i + 2]!];
    const n = cross(
      [p[b]! - p[a]!, p[b + 1]! - p[a + 1]!, p[b + 2]! - p[a + 2]!],
      [p[c]! - p[a]!, p[c + 1]! - p[a + 1]!, p[c + 2]! - p[a + 2]!],
    );
    const area = Math.hypot(n[0], n[1], n[2]) / 2;
    total += area;
    if (-n[2] / 2 < STEEPEST * area) continue;
    if (p[a + 2] === 0 && p[b + 2] === 0 && p[c + 2] === 0) contact += area;
    else overhang += area;
  }
  return { contact, overhang: total > 0 ? overhang / total : 0 };
}
