import { dot, type Vec3 } from '../../maths/vec3.js';

/** A half-plane that ends on an edge: the unit vector from the edge into it, and its unit normal to the outside. */
export interface HalfPlane {
  readonly into: Vec3;
  readonly normal: Vec3;
}

/**
 * Angle between two faces at their common edge, measured through the inside, rad: under π on a ridge, π flat, over π in
 * a valley (seen from outside).
 */
export function dihedralAngle(a: HalfPlane, b: HalfPlane): number {
  // b's direction in the axes (into, -normal) of a: turning from a through the inside.
  const angle = Math.atan2(-dot(b.into, a.normal), dot(b.into, a.into));
  return angle < 0 ? angle + 2 * Math.PI : angle;
}

/** Angle between the half-planes whichever side is inside, 0 to π rad. */
export const openingAngle = (dihedral: number): number => Math.min(dihedral, 2 * Math.PI - dihedral);
