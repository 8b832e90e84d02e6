import type { Vec3 } from '../maths/vec3.js';

/** What is known of one load case or combination: forces by member index in N (tension positive), displacements in mm, reactions in N. */
export interface CaseResult {
  readonly name: string;
  readonly kind:
    | 'given'
    | 'self-weight'
    | 'permanent'
    | 'imposed'
    | 'snow'
    | 'wind'
    | 'temperature'
    | 'misfit'
    | 'combination';
  /** NaN-free: null where not computed. */
  readonly forces: Float64Array | null;
  /** 3 a node, mm. */
  readonly displacements: Float64Array | null;
  readonly reactions: readonly {
    readonly node: string;
    readonly force: Vec3;
  }[];
}

/** End actions of one member in one combination, in its local axes: N, N mm. */
export interface MemberActions {
  readonly combination: string;
  readonly axial: number;
  readonly shearY: number;
  readonly shearZ: number;
  /** Largest along the member, absolute. */
  readonly momentY: number;
  readonly momentZ: number;
  readonly torsion: number;
  /** Shortest load duration class in the combination (EN 1995-1-1 3.1.3 (2)). */
  readonly duration: 'permanent' | 'long' | 'medium' | 'short' | 'instantaneous';
  /** Moments about local y and z at the "from" end and at the "to" end, where its sockets begin, absolute; absent: not known apart. */
  readonly endMoments?: readonly [readonly [number, number], readonly [number, number]];
}

export interface MechanismNote {
  /** In words: "N7 and N8 can swing about N3-N4". */
  readonly words: string;
  readonly nodes: readonly string[];
  /** Displacement shape, 3 a node, largest component 1. */
  readonly shape: Float64Array;
  readonly singularValue: number;
}

export interface StateCounts {
  readonly rank: number;
  readonly selfStressStates: number;
  readonly mechanisms: number;
  readonly rigidBody: number;
  readonly mechanismNotes: readonly MechanismNote[];
  /** Whether the loads do no work on the mechanisms; null without loads. */
  readonly loadCompatible: boolean | null;
}

export interface BucklingResult {
  readonly combination: string;
  /** Lowest load factors, ascending. */
  readonly factors: readonly number[];
  /** Shape of the lowest, 3 a node, largest component 1. */
  readonly shape: Float64Array | null;
  /** Mark of the strut that bows most between its nodes in the lowest shape; null where the nodes move most. */
  readonly strut: string | null;
  /** Lowest factor with design stiffness (EN 1995-1-1 2.2.2: E0.05 / gammaM, creep under the permanent share); null: nothing buckles. */
  readonly design?: number | null;
  /** The strut nearest to Euler's load from node to node with pinned ends, with design stiffness; null: none is pressed. */
  readonly euler?: { readonly strut: string; readonly factor: number } | null;
}

/** What a support on the ground must hold under one combination, N: tension and pressure positive, one of them 0. */
export interface SupportDemand {
  readonly node: string;
  readonly combination: string;
  readonly uplift: number;
  readonly pressure: number;
  readonly shear: number;
  /** Ballast that holds the uplift down, kg. */
  readonly ballast: number;
}

/** How near the whole is to tipping over an edge of its feet: overturning over holding moment of the worst combination. */
export interface Overturning {
  readonly edge: readonly [string, string];
  readonly combination: string;
  /** null: nothing holds it. */
  readonly ratio: number | null;
}

/** All that statics finds out. A null field was not computed; the reason stands in `notChecked`. */
export interface Solution {
  readonly counts: StateCounts | null;
  readonly cases: readonly CaseResult[];
  readonly combinations: readonly CaseResult[];
  /** By member index: the actions of every combination (and of the given forces). */
  readonly actions: readonly (readonly MemberActions[])[];
  readonly buckling: readonly BucklingResult[];
  /** Every support held in z under every combination, and under the climber that lifts it most; absent: not analysed. */
  readonly supports?: readonly SupportDemand[];
  /** Absent: fewer than three feet, or not analysed. */
  readonly overturning?: Overturning | null;
  /** Largest normalised residual of the solves behind this. */
  readonly solveResidual: number | null;
  readonly checked: readonly string[];
  readonly notChecked: readonly string[];
}

/** Verdict on one part: utilisation 1 is just strong enough. */
export interface Utilisation {
  readonly mark: string;
  readonly kind: 'strut' | 'socket' | 'panel';
  /** For a socket: the node's mark. */
  readonly at: string | null;
  readonly combination: string;
  readonly force: number;
  readonly utilisation: number;
  /** Rule and clause: "EN 1995-1-1 6.3.2 (6.23)". */
  readonly rule: string;
}
