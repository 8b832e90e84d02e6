import { fitPlane } from '../../../maths/plane-fit.js';
import { cross, dot, normalise, perpendicular, scale, type Vec3, Z_AXIS } from '../../../maths/vec3.js';
import { type Camera, PLAN } from './camera.js';

/** The view square to the plane in which the points lie, z or else y upward on the sheet. */
export function planeCamera(points: readonly Vec3[]): Camera {
  const fit = fitPlane(points);
  if (!fit) return PLAN;
  const normal = fit.normal[2] < 0 || (fit.normal[2] === 0 && fit.normal[1] > 0) ? scale(fit.normal, -1) : fit.normal;
  if (Math.abs(normal[2]) > LEVEL) return PLAN;
  const level = cross(Z_AXIS, normal);
  const right = normalise(dot(level, level) > 0 ? level : perpendicular(normal));
  const up = normalise(cross(normal, right));
  return { name: 'Square view', right, up, toward: normal };
}

/** A plane whose normal is nearer to z than this is seen in plan. */
const LEVEL = 1 - 1e-9;
