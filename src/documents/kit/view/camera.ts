import { dot, type Vec3 } from '../../../maths/vec3.js';

/** An orthographic view: unit axes to the right and up on the sheet, and toward the viewer; right-handed. */
export interface Camera {
  readonly name: string;
  readonly right: Vec3;
  readonly up: Vec3;
  readonly toward: Vec3;
}

const [R2, R3, R6] = [Math.SQRT1_2, 1 / Math.sqrt(3), 1 / Math.sqrt(6)];

/** From the front, right and above, equal angles to the three axes (ISO 5456-3, 5.1). */
export const ISOMETRIC: Camera = {
  name: 'Isometric view',
  right: [R2, R2, 0],
  up: [-R6, R6, 2 * R6],
  toward: [R3, -R3, R3],
};
export const PLAN: Camera = { name: 'Plan', right: [1, 0, 0], up: [0, 1, 0], toward: [0, 0, 1] };
export const FRONT: Camera = { name: 'Front elevation', right: [1, 0, 0], up: [0, 0, 1], toward: [0, -1, 0] };
export const LEFT: Camera = { name: 'Left elevation', right: [0, -1, 0], up: [0, 0, 1], toward: [-1, 0, 0] };
export const RIGHT: Camera = { name: 'Right elevation', right: [0, 1, 0], up: [0, 0, 1], toward: [1, 0, 0] };

/** Right, up and depth (larger is nearer) of a point, in its own unit. */
export const project = (camera: Camera, p: Vec3): Vec3 => [
  dot(p, camera.right),
  dot(p, camera.up),
  dot(p, camera.toward),
];
