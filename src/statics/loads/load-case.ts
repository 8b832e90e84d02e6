import type { Vec3 } from '../../maths/vec3.js';
import type { CaseResult, MemberActions } from '../../model/solution.js';

export type CaseKind = Exclude<CaseResult['kind'], 'given' | 'combination'>;
export type Duration = MemberActions['duration'];

/** What one case puts along a member. */
export interface LineLoad {
  /** N/mm in the truss's axes, even over the length from node to node. */
  readonly even: Vec3;
  /**
   * Bending moment in N mm that the true, uneven spread puts at mid-span of a simple beam beyond that of the even load, as the
   * direction of the load times the moment.
   */
  readonly extraMoment: Vec3;
}

/** One load case, characteristic values. */
export interface LoadCase {
  readonly name: string;
  readonly kind: CaseKind;
  readonly duration: Duration;
  /** N, three a node. */
  readonly nodal: Float64Array;
  /** By member index. */
  readonly lines: ReadonlyMap<number, LineLoad>;
  /** Elongation of each member if it were free, mm; null: none. */
  readonly freeElongation: Float64Array | null;
}

/** Standard acceleration of free fall in m/s² (3rd CGPM 1901): N for one kg. */
export const GRAVITY = 9.80665;

/**
 * Load-duration class of each kind: EN 1995-1-1 tables 2.1 and 2.2 (from memory) for self-weight, imposed, snow and wind;
 * temperature and lack of fit are not in them and take a longer class: a judgement, no source.
 */
export const DURATION: Readonly<Record<CaseKind, Duration>> = {
  'self-weight': 'permanent',
  permanent: 'permanent',
  misfit: 'permanent',
  temperature: 'medium',
  imposed: 'medium',
  snow: 'short',
  wind: 'short',
};

/** Gathers what falls on one case while it is put together. */
export class CaseBuilder {
  readonly nodal: Float64Array;
  readonly lines = new Map<number, LineLoad>();
  freeElongation: Float64Array | null = null;
  private readonly memberCount: number;

  constructor(nodeCount: number, memberCount: number) {
    this.nodal = new Float64Array(3 * nodeCount);
    this.memberCount = memberCount;
  }

  addNode(node: number, force: Vec3): void {
    for (let k = 0; k < 3; k++) this.nodal[3 * node + k] += force[k]!;
  }

  addLine(member: number, even: Vec3, extraMoment: Vec3 = [0, 0, 0]): void {
    const old = this.lines.get(member) ?? { even: [0, 0, 0], extraMoment: [0, 0, 0] };
    const sum = (a: Vec3, b: Vec3): Vec3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];
    this.lines.set(member, { even: sum(old.even, even), extraMoment: sum(old.extraMoment, extraMoment) });
  }

  addElongation(member: number, mm: number): void {
    this.freeElongation ??= new Float64Array(this.memberCount);
    this.freeElongation[member] += mm;
  }

  done(name: string, kind: CaseKind, duration: Duration = DURATION[kind]): LoadCase {
    const { nodal, lines, freeElongation } = this;
    return { name, kind, duration, nodal, lines, freeElongation };
  }
}
