import { type ColumnElimination, eliminateColumns, type SparseVector } from '../maths/sparse/column-elimination.js';
import type { SparseMatrix } from '../maths/sparse/csc.js';
import { multiplyTransposed } from '../maths/sparse/multiply.js';
import { leftNullSpace, type NullSpace, SINGULAR_CUT } from '../maths/sparse/null-space.js';
import { norm, orthonormalise } from '../maths/sparse/orthonormalise.js';
import { blockPoints, type Freedoms, gather, numberFreedoms, spread } from './freedoms.js';
import { equilibriumMatrix, type PinFigure } from './pin-figure.js';
import { rigidMotions } from './rigid-body.js';

/** Where the elimination's pivots leave room for doubt (0.7 % of 3,000 random structures), inverse iteration decides. */
const DOUBTFUL_PIVOT = 1e-6;
/** A pivot overstates the singular value it stands for; this margin over the cut has been enough. */
const PIVOT_MARGIN = 100;
const DOUBTFUL_DROP = 1e-12;
/** Up to this many freedoms inverse iteration always runs, to give the singular value next to zero: half a second there. */
const ARBITER_FREEDOMS = 16000;
/** It holds its vectors dense, so it is not asked for more mechanisms than this. */
const ARBITER_VECTORS = 120;
/** A singular value of the equilibrium matrix (unit bar directions) below this is a near-mechanism worth a note: sound structures lie above 1e-2. */
export const NEAR_MECHANISM = 1e-3;

/** One way in which the figure can move without straining a bar, at first order. */
interface Mechanism {
  /** Displacements over all nodes, three a node, largest component 1. */
  readonly shape: Float64Array;
  /** |Aᵀ z| / |z|: 0 to round-off for a mechanism, small for a near-mechanism. */
  readonly singularValue: number;
}

/** Maxwell-Calladine counts of a pin-jointed figure on its supports. */
export interface FigureCounts {
  readonly bars: number;
  readonly freedoms: number;
  readonly rank: number;
  readonly selfStressStates: number;
  /** Without the rigid-body freedoms. */
  readonly mechanisms: number;
  readonly rigidBody: number;
  readonly mechanismShapes: readonly Mechanism[];
  readonly nearMechanisms: readonly Mechanism[];
  /** Bars that each carry a state of self-stress: one a state. */
  readonly redundantBars: Int32Array;
  /**
   * Bar forces in equilibrium with no load, the redundant bar's at 1, for each state; the states of near-mechanisms that are
   * counted come last, their largest force at 1. Made when asked for.
   */
  selfStress(state: number): SparseVector;
  /** Which of the two ways decided the rank. */
  readonly decidedBy: 'elimination' | 'inverse iteration';
  readonly leastSingularValue: number | null;
}

/**
 * s = b - r states of self-stress and m = f - r - (rigid-body freedoms) mechanisms, with bases of both (Maxwell 1864;
 * Calladine, Int. J. Solids Struct. 14 (1978) 161-172). The rank comes from a sparse elimination of the equilibrium
 * matrix; where its pivots leave doubt another order of bars is tried and inverse iteration decides. Singular values up to
 * `zero` count as nought: for coordinates that were rounded the caller gives more than round-off.
 */
export function countStates(figure: PinFigure, zero: number = SINGULAR_CUT): FigureCounts {
  const { freedoms, a } = examinationOf(figure);
  const { elimination, space, counted, rank } = rankOf(figure, zero);
  const rigid = rigidMotions(figure);
  const rigidFree = rigid.map((v) => gather(freedoms, v));
  let shapes: Mechanism[];
  let near: Mechanism[] = [];
  let least: number | null = null;
  const byIteration = space !== null && freedoms.count - space.vectors.length !== elimination.rank;
  if (byIteration) {
    const inside = orthonormalise([...rigidFree, ...space.vectors], undefined).vectors.slice(rigidFree.length);
    shapes = inside
      .filter((z) => norm(z) > 0.5)
      .map((z) => ({ shape: scaled(spread(freedoms, z)), singularValue: norm(multiplyTransposed(a, z)) }));
  } else shapes = internalMechanisms(elimination, freedoms, rigidFree, a);
  if (space) {
    const others = space.next.slice(counted.length);
    least = others[0]?.value ?? null;
    near = others
      .filter((n) => n.value < NEAR_MECHANISM)
      .map((n) => ({ shape: scaled(spread(freedoms, n.vector)), singularValue: n.value }));
  }
  shapes = [
    ...shapes,
    ...counted.map((z) => ({ shape: scaled(spread(freedoms, z)), singularValue: norm(multiplyTransposed(a, z)) })),
  ];
  return {
    bars: a.columns,
    freedoms: freedoms.count,
    rank,
    selfStressStates: a.columns - rank,
    mechanisms: freedoms.count - rank - rigid.length,
    rigidBody: rigid.length,
    mechanismShapes: shapes,
    nearMechanisms: near,
    redundantBars: elimination.dependent,
    selfStress: (state) => {
      if (state < elimination.dependent.length) return elimination.columnNull(state);
      // The bar forces of a near-null: its right singular vector, Aᵀ z, with the largest at 1.
      const t = scaled(multiplyTransposed(a, counted[state - elimination.dependent.length]));
      return { indices: Int32Array.from(t.keys()), values: t };
    },
    decidedBy: byIteration ? 'inverse iteration' : 'elimination',
    leastSingularValue: least,
  };
}

/** Number of states of self-stress alone, with the same rank. */
export function countSelfStress(figure: PinFigure, zero: number): number {
  return examinationOf(figure).a.columns - rankOf(figure, zero).rank;
}

interface Rank {
  readonly rank: number;
  readonly elimination: ColumnElimination;
  /** Null where inverse iteration was not asked. */
  readonly space: NullSpace | null;
  /** Near-mechanisms that count as mechanisms. */
  readonly counted: readonly Float64Array[];
}

function rankOf(figure: PinFigure, zero: number): Rank {
  const { freedoms, sweepAlong, spaceOf } = examinationOf(figure);
  const axes = sweepAxes(figure);
  let elimination = sweepAlong(axes[0]);
  const doubtful = (e: ColumnElimination): boolean =>
    e.leastPivot < Math.max(DOUBTFUL_PIVOT, PIVOT_MARGIN * zero) || e.largestDropped > DOUBTFUL_DROP;
  for (const axis of axes.slice(1)) {
    if (!doubtful(elimination)) break;
    const other = sweepAlong(axis);
    if (other.leastPivot > elimination.leastPivot) elimination = other;
  }
  const nulls = freedoms.count - elimination.rank;
  const asked =
    freedoms.count > 0 && nulls <= ARBITER_VECTORS && (doubtful(elimination) || freedoms.count <= ARBITER_FREEDOMS);
  const space = asked ? spaceOf() : null;
  const counted = space?.next.filter((n) => n.value <= zero).map((n) => n.vector) ?? [];
  const whole = space ? freedoms.count - space.vectors.length : elimination.rank;
  return { rank: whole - counted.length, elimination, space, counted };
}

/** What does not depend on where nought ends: several cuts are put to one figure. */
interface Examination {
  readonly freedoms: Freedoms;
  readonly a: SparseMatrix;
  sweepAlong(axis: number): ColumnElimination;
  spaceOf(): NullSpace;
}

const examined = new WeakMap<PinFigure, Examination>();

function examinationOf(figure: PinFigure): Examination {
  const known = examined.get(figure);
  if (known) return known;
  const freedoms = numberFreedoms(figure.fixed, 3);
  const a = equilibriumMatrix(figure, freedoms);
  const sweeps = new Map<number, ColumnElimination>();
  let space: NullSpace | undefined;
  const examination: Examination = {
    freedoms,
    a,
    sweepAlong(axis) {
      let found = sweeps.get(axis);
      if (!found) sweeps.set(axis, (found = sweep(figure, freedoms, a, axis)));
      return found;
    },
    spaceOf() {
      space ??= leftNullSpace(a, { blockStarts: freedoms.blockStarts, points: blockPoints(freedoms, figure.nodes) });
      return space;
    },
  };
  examined.set(figure, examination);
  return examination;
}

/** Axes by the figure's extent, longest first. */
function sweepAxes(figure: PinFigure): number[] {
  const extent = [0, 1, 2].map((k) => {
    let [low, high] = [Infinity, -Infinity];
    for (let i = k; i < figure.nodes.length; i += 3) {
      low = Math.min(low, figure.nodes[i]);
      high = Math.max(high, figure.nodes[i]);
    }
    return high - low;
  });
  return [0, 1, 2].sort((p, q) => extent[q] - extent[p] || p - q);
}

/** Bars in the order of their later end along an axis, rows in the order of their nodes: a front that sweeps the figure. */
function sweep(figure: PinFigure, freedoms: Freedoms, a: SparseMatrix, axis: number): ColumnElimination {
  const count = figure.nodes.length / 3;
  const nodes = Array.from({ length: count }, (_, i) => i).sort(
    (p, q) => figure.nodes[3 * p + axis] - figure.nodes[3 * q + axis] || p - q,
  );
  const place = new Int32Array(count);
  nodes.forEach((n, k) => {
    place[n] = k;
  });
  const first = (e: number): number => Math.min(place[figure.ends[2 * e]], place[figure.ends[2 * e + 1]]);
  const last = (e: number): number => Math.max(place[figure.ends[2 * e]], place[figure.ends[2 * e + 1]]);
  const order = Array.from({ length: a.columns }, (_, e) => e).sort(
    (p, q) => last(p) - last(q) || first(p) - first(q) || p - q,
  );
  const rank = new Float64Array(freedoms.count);
  freedoms.of.forEach((f, k) => {
    if (f >= 0) rank[f] = 3 * place[Math.floor(k / 3)] + (k % 3);
  });
  return eliminateColumns(a, order, rank);
}

/**
 * Mechanisms from the rows without a pivot. Rigid-body freedoms are taken out by holding as many of those rows as
 * determine them, so that the shapes stay local and can be said in words.
 */
function internalMechanisms(
  elimination: ColumnElimination,
  freedoms: Freedoms,
  rigid: readonly Float64Array[],
  a: SparseMatrix,
): Mechanism[] {
  const { freeRows } = elimination;
  const out: Mechanism[] = [];
  // Any rigid motion is sum of its values at the free rows times their vectors: pick free rows on which rigid motions are independent.
  const held = pickRows(rigid, freeRows);
  if (held === null) return out;
  for (let k = 0; k < freeRows.length; k++) {
    if (held.rows.includes(k)) continue;
    const v = elimination.rowNull(k);
    const z = new Float64Array(freedoms.count);
    v.indices.forEach((i, p) => {
      z[i] = v.values[p];
    });
    const size = norm(z);
    out.push({
      shape: scaled(spread(freedoms, z)),
      singularValue: size > 0 ? norm(multiplyTransposed(a, z)) / size : 0,
    });
  }
  return out;
}

/** Indices into `rows` at which the motions are independent, found by elimination with full pivoting; null where there are too few. */
function pickRows(motions: readonly Float64Array[], rows: Int32Array): { rows: number[] } | null {
  const m = motions.map((v) => Float64Array.from(rows, (r) => v[r]));
  const picked: number[] = [];
  for (let step = 0; step < m.length; step++) {
    let [best, vector, row] = [0, -1, -1];
    for (let i = step; i < m.length; i++)
      for (let k = 0; k < rows.length; k++)
        if (Math.abs(m[i][k]) > best) [best, vector, row] = [Math.abs(m[i][k]), i, k];
    if (vector < 0) return null;
    [m[step], m[vector]] = [m[vector], m[step]];
    for (let i = step + 1; i < m.length; i++) {
      const f = m[i][row] / m[step][row];
      for (let k = 0; k < rows.length; k++) m[i][k] -= f * m[step][k];
    }
    picked.push(row);
  }
  return { rows: picked };
}

/** The vector with its largest component at 1, of positive sign. */
function scaled(v: Float64Array): Float64Array {
  let most = 0;
  for (const x of v) if (Math.abs(x) > Math.abs(most)) most = x;
  return most === 0 ? v : v.map((x) => x / most + 0);
}

/** Whether the loads do no work on the mechanisms: |Zᵀ p| <= 1e-9 |Z| |p|; loads over all nodes, three a node, N. */
export function loadIsCompatible(counts: FigureCounts, rigid: readonly Float64Array[], loads: Float64Array): boolean {
  const size = norm(loads);
  return [...counts.mechanismShapes.map((m) => m.shape), ...rigid].every((z) => {
    let work = 0;
    for (let i = 0; i < z.length; i++) work += z[i] * loads[i];
    return Math.abs(work) <= SINGULAR_CUT * norm(z) * size;
  });
}
