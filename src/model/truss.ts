import type { Vec3 } from '../maths/vec3.js';

/**
 * The truss as the program works with it: lengths in mm, forces in N (tension positive), angles in rad, z up.
 * Readers convert from the file's units and apply the job's `scale` and `forceScale`; nothing later does.
 * Lists keep the file's order; marks are unique in their list whatever the case.
 */
export interface Truss {
  readonly nodes: readonly TrussNode[];
  readonly members: readonly Member[];
  readonly faces: readonly Face[];
  readonly cells: readonly Cell[];
  readonly reciprocal: Reciprocal | null;
  readonly supports: readonly Support[];
  readonly loads: readonly NodeLoad[];
}

export interface TrussNode {
  readonly mark: string;
  readonly at: Vec3;
}

export interface Member {
  readonly mark: string;
  /** Marks of the nodes at its two ends, in the file's order: "from" and "to" of every list. */
  readonly ends: readonly [string, string];
  /** Claimed axial force in N, tension positive; null where the file gives none. */
  readonly force: number | null;
  /** Name of a section of the catalogue or the job; null: the job's default. */
  readonly section: string | null;
  /** Overrides of the section's area (mm²) and modulus (MPa), for the analysis only. */
  readonly area: number | null;
  readonly modulus: number | null;
  /** Turn of a rectangular section about the strut's axis, rad; null: from the faces beside it. */
  readonly roll: number | null;
  readonly group: string | null;
}

export interface Face {
  readonly mark: string;
  /** Marks of the nodes round the face, an ordered loop in either sense, first not repeated. */
  readonly nodes: readonly string[];
  readonly panel: boolean;
  readonly group: string | null;
}

export interface Cell {
  readonly mark: string;
  readonly faces: readonly string[];
}

/** The force diagram: one vertex a cell; N for one mm² of force face. */
export interface Reciprocal {
  readonly newtonPerArea: number;
  readonly vertices: readonly { readonly cell: string; readonly at: Vec3 }[];
}

export interface Support {
  readonly node: string;
  readonly fixed: {
    readonly x: boolean;
    readonly y: boolean;
    readonly z: boolean;
  };
}

export interface NodeLoad {
  readonly case: string;
  readonly node: string;
  /** N, in the truss's axes. */
  readonly force: Vec3;
}

/** The load case that the members' given forces claim to balance. */
export const GIVEN_CASE = 'given';
/** The mark of the unbounded cell. */
export const OUTSIDE_CELL = 'outside';
