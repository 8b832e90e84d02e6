import { dot, type Vec3 } from '../../maths/vec3.js';

/** A face of a cube whose faces are square to the truss's axes: right and up as it is looked at from outside, u x v = normal. */
export interface CubeFace {
  readonly name: string;
  readonly normal: Vec3;
  readonly u: Vec3;
  readonly v: Vec3;
}

/** The sides in the order in which they unfold to the right, z up on each; then the top and the bottom, x to the right on both. */
export const CUBE_FACES: readonly CubeFace[] = [
  { name: 'x-', normal: [-1, 0, 0], u: [0, -1, 0], v: [0, 0, 1] },
  { name: 'y-', normal: [0, -1, 0], u: [1, 0, 0], v: [0, 0, 1] },
  { name: 'x+', normal: [1, 0, 0], u: [0, 1, 0], v: [0, 0, 1] },
  { name: 'y+', normal: [0, 1, 0], u: [-1, 0, 0], v: [0, 0, 1] },
  { name: 'z+', normal: [0, 0, 1], u: [1, 0, 0], v: [0, 1, 0] },
  { name: 'z-', normal: [0, 0, -1], u: [1, 0, 0], v: [0, -1, 0] },
];

/** Cosines nearer than this are equal: such a bore meets an edge, and no size gives it a face. */
const SAME = 1e-12;

/** The face that an axis from the cube's middle meets. */
export const faceOf = (direction: Vec3): CubeFace =>
  CUBE_FACES.reduce((best, f) => (dot(f.normal, direction) > dot(best.normal, direction) + SAME ? f : best));
