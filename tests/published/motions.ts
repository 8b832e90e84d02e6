import { seededRandom } from '../../src/maths/random.js';

/** A rotation as nine numbers by rows. */
export type Rotation = readonly number[];

/** Quarter turns: axis to axis, so that supports along the axes stay along axes. */
export const QUARTER_TURNS: readonly Rotation[] = [
  [1, 0, 0, 0, 1, 0, 0, 0, 1],
  [0, 0, 1, 1, 0, 0, 0, 1, 0],
  [0, -1, 0, 1, 0, 0, 0, 0, 1],
  [-1, 0, 0, 0, 0, 1, 0, 1, 0],
];

/** A rotation about a random axis, from a unit quaternion of a fixed seed. */
export function anyRotation(seed: number): Rotation {
  const random = seededRandom(seed);
  const q = [0, 1, 2, 3].map(() => random() - 0.5);
  const l = Math.hypot(q[0], q[1], q[2], q[3]);
  const [w, x, y, z] = q.map((v) => v / l);
  return [
    1 - 2 * (y * y + z * z),
    2 * (x * y - w * z),
    2 * (x * z + w * y),
    2 * (x * y + w * z),
    1 - 2 * (x * x + z * z),
    2 * (y * z - w * x),
    2 * (x * z - w * y),
    2 * (y * z + w * x),
    1 - 2 * (x * x + y * y),
  ];
}

/** R p for every triple of `values`, scaled. */
export function turned(r: Rotation, values: ArrayLike<number>, factor = 1): Float64Array {
  const out = new Float64Array(values.length);
  for (let i = 0; i < values.length; i += 3)
    for (let k = 0; k < 3; k++)
      out[i + k] = factor * (r[3 * k] * values[i] + r[3 * k + 1] * values[i + 1] + r[3 * k + 2] * values[i + 2]);
  return out;
}

/** R⁻¹ p for every triple. */
export const turnedBack = (r: Rotation, values: ArrayLike<number>): Float64Array =>
  turned([r[0], r[3], r[6], r[1], r[4], r[7], r[2], r[5], r[8]], values);

/** Held freedoms after a quarter turn. */
export function turnedHeld(r: Rotation, fixed: Uint8Array): Uint8Array {
  const out = new Uint8Array(fixed.length);
  for (let i = 0; i < fixed.length; i += 3)
    for (let k = 0; k < 3; k++)
      for (let c = 0; c < 3; c++) if (Math.abs(r[3 * k + c]) > 0.5 && fixed[i + c]) out[i + k] = 1;
  return out;
}
