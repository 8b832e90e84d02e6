import { add, addScaled, cross, dot, length, normalise, perpendicular, scale, type Vec3, ZERO } from '../maths/vec3.js';

/** Below this share of its own length a reference direction is taken as parallel to the strut and gives no roll. */
const PARALLEL = 1e-3;

/** d's part square to x, unit; null where d runs along x. */
function across(d: Vec3, x: Vec3): Vec3 | null {
  const flat = addScaled(d, x, -dot(d, x));
  return length(flat) > PARALLEL * Math.max(length(d), PARALLEL) ? normalise(flat) : null;
}

/**
 * Local axes of a strut: x along it, z (a rectangle's height) towards the mean outward normal of the faces beside it,
 * or up; then turned about x by `roll` rad. The same axes serve both ends.
 */
export function strutAxes(
  x: Vec3,
  faceNormals: readonly Vec3[],
  up: Vec3,
  roll: number,
): { readonly x: Vec3; readonly y: Vec3; readonly z: Vec3 } {
  const meanNormal = faceNormals.reduce<Vec3>((sum, n) => add(sum, n), ZERO);
  const reference = across(meanNormal, x) ?? across(up, x) ?? perpendicular(x);
  const side = cross(reference, x);
  const z = add(scale(reference, Math.cos(roll)), scale(side, -Math.sin(roll)));
  const y = cross(z, x);
  return { x, y: normalise(y), z: normalise(z) };
}
