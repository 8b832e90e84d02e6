import { CUBE_FACES } from '../../detailing/systems/cube-faces.js';
import { add, dot, scale } from '../../maths/vec3.js';
import type { Point } from '../kit/geometry2.js';
import { type Camera, project } from '../kit/view/camera.js';

/** A face that is seen less than this is a line. */
const EDGE_ON = 1e-6;

/** The faces of a cube that are seen in a view, mm at full size from its middle. */
export const cubePicture = (half: number, camera: Camera): Point[][] =>
  CUBE_FACES.filter((f) => dot(f.normal, camera.toward) > EDGE_ON).map((f) =>
    [
      [-1, -1],
      [1, -1],
      [1, 1],
      [-1, 1],
    ].map(([a, b]): Point => {
      const corner = add(f.normal, add(scale(f.u, a!), scale(f.v, b!)));
      const [x, y] = project(camera, scale(corner, half));
      return [x, y];
    }),
  );
