import type { Vec3 } from '../../maths/vec3.js';

/** A length of a member of one stiffness: mm, N, N mm². Local axes: x along the member, y and z of its section. */
export interface Segment {
  readonly length: number;
  /** E A */
  readonly axial: number;
  /** E I about local y and about local z. */
  readonly bendingY: number;
  readonly bendingZ: number;
  /** G J */
  readonly torsion: number;
}

/** A joint that turns: N mm/rad about local y and z, at a distance from the member's first node. */
export interface Spring {
  readonly at: number;
  readonly stiffness: number;
}

/**
 * A straight member of a space frame from node to node: its segments in a row (a printed end zone, the strut, a printed
 * end zone) with rotational springs between them.
 */
export interface FrameMember {
  readonly ends: readonly [number, number];
  /** Unit vectors, right-handed. */
  readonly axes: { readonly x: Vec3; readonly y: Vec3; readonly z: Vec3 };
  readonly segments: readonly Segment[];
  readonly springs: readonly Spring[];
}

/** A space frame: nodes x, y, z in mm; six freedoms a node (ux uy uz in mm, rx ry rz in rad), 1 where held. */
export interface Frame {
  readonly nodes: Float64Array;
  readonly members: readonly FrameMember[];
  readonly fixed: Uint8Array;
}

export const memberLength = (m: FrameMember): number => m.segments.reduce((sum, s) => sum + s.length, 0);
