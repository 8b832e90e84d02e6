import { analyse } from '../maths/sparse/analyse.js';
import { fromTriplets, type SparseMatrix } from '../maths/sparse/csc.js';
import { diagonalOf, type Factor, factorise } from '../maths/sparse/factorise.js';
import { addToDiagonal } from '../maths/sparse/null-space.js';
import { solve } from '../maths/sparse/solve.js';
import { blockPoints, type Freedoms, gather, numberFreedoms, spread } from './freedoms.js';
import { barDirections, type PinFigure } from './pin-figure.js';

/** Pivots below this share of their own diagonal entry: the stiffness is singular to working precision, its solutions are not to be trusted. */
export const SINGULAR_PIVOT = 1e-11;

export interface PinTruss extends PinFigure {
  /** E A of each bar, N; positive. */
  readonly axialStiffness: Float64Array;
  /** Force that each bar carries before any load, N: its t/L stiffens the nodes sideways. It is not in the results. Absent: none. */
  readonly prestress?: ArrayLike<number>;
}

/** Loads of one case. */
export interface PinLoads {
  /** N, three a node. */
  readonly forces: Float64Array;
  /** Elongation that each bar would take if it were free, mm: temperature (alpha ΔT L) or lack of fit (longer: positive). Absent: none. */
  readonly freeElongation?: Float64Array;
}

export interface PinResult {
  /** N, tension positive. */
  readonly axial: Float64Array;
  /** mm, three a node. */
  readonly displacements: Float64Array;
  /** N, three a node: what the support gives to the node in its held directions, 0 elsewhere. */
  readonly reactions: Float64Array;
  /** What is left of bar forces and loads at the free freedoms, N, three a node. */
  readonly imbalance: Float64Array;
  /** Normalised residual of the solve. */
  readonly residual: number;
}

/** Share of the largest diagonal entry that is added where a figure can move. */
const SOFTENING = 1e-9;

/**
 * The bars' elastic answer to loads that the figure can carry (in the range of A) and to free elongations, whether or not the
 * figure can move: a faint spring at every node holds the mechanisms, and refinement takes its share out again. N.
 */
export function elasticForces(truss: PinTruss, loads: PinLoads): Float64Array {
  const freedoms = numberFreedoms(truss.fixed, 3);
  const { lengths, units } = barDirections(truss);
  const k = Float64Array.from(lengths, (l, e) => truss.axialStiffness[e] / l);
  const stiffness = pinStiffness(truss, freedoms, k, units);
  const most = diagonalOf(stiffness).reduce((a, b) => Math.max(a, b), 0);
  const held = addToDiagonal(stiffness, SOFTENING * (most > 0 ? most : 1));
  const right = rightSide(truss, loads, k, units);
  const { x } = solve(factorPin(truss, freedoms, held), stiffness, [gather(freedoms, right)]);
  return strained(truss, units, k, spread(freedoms, x[0]), loads);
}

export type PinSolution =
  | { readonly state: 'solved'; readonly cases: readonly PinResult[]; readonly pivotRatio: number }
  /** The figure can move: `node` has a freedom that no bar resists. */
  | { readonly state: 'mechanism'; readonly node: number };

/**
 * Forces, displacements and reactions of a pin-jointed truss by direct stiffness: K d = p + A (EA/L) e0 with
 * K = A (EA/L) Aᵀ, then t = (EA/L)(Aᵀ d - e0) (McGuire, Gallagher and Ziemian, Matrix Structural Analysis, 2nd ed. 2000, ch. 3).
 * The stiffness is factorised once for all cases. A figure that can move is a named state; state-counts says how it moves.
 */
export function solvePinTruss(truss: PinTruss, cases: readonly PinLoads[]): PinSolution {
  const freedoms = numberFreedoms(truss.fixed, 3);
  const { lengths, units } = barDirections(truss);
  const k = Float64Array.from(lengths, (l, e) => truss.axialStiffness[e] / l);
  const stiffness = pinStiffness(
    truss,
    freedoms,
    k,
    units,
    truss.prestress && Float64Array.from(lengths, (l, e) => truss.prestress![e] / l),
  );
  const factor = factorPin(truss, freedoms, stiffness);
  if (factor.state === 'zero pivot') return { state: 'mechanism', node: nodeOf(freedoms, factor.stoppedAt) };
  if (factor.pivotRatio < SINGULAR_PIVOT) return { state: 'mechanism', node: nodeOf(freedoms, weakest(factor)) };
  const right = cases.map((c) => gather(freedoms, rightSide(truss, c, k, units)));
  const { x, residual } = solve(factor, stiffness, right);
  return {
    state: 'solved',
    pivotRatio: factor.pivotRatio,
    cases: cases.map((c, i) => {
      const displacements = spread(freedoms, x[i]);
      const axial = strained(truss, units, k, displacements, c);
      const left = c.forces.slice();
      addBarForces(left, truss, units, axial, 1);
      if (truss.prestress) addSidePulls(left, truss, units, lengths, truss.prestress, displacements);
      return {
        axial,
        displacements,
        reactions: left.map((v, k) => (truss.fixed[k] ? 0 - v : 0)),
        imbalance: left.map((v, k) => (truss.fixed[k] ? 0 : v)),
        residual: residual[i],
      };
    }),
  };
}

/** Lower triangle of A diag(k) Aᵀ, plus `across` (t/L) square to each bar, with every entry of each pair of joined nodes present. */
export function pinStiffness(
  figure: PinFigure,
  freedoms: Freedoms,
  k: ArrayLike<number>,
  units: Float64Array,
  across?: ArrayLike<number>,
): SparseMatrix {
  const rows: number[] = [];
  const columns: number[] = [];
  const values: number[] = [];
  const put = (f: number, g: number, v: number): void => {
    if (f < 0 || g < 0 || f < g) return;
    rows.push(f);
    columns.push(g);
    values.push(v);
  };
  for (let f = 0; f < freedoms.count; f++) put(f, f, 0);
  for (let e = 0; e < figure.ends.length / 2; e++)
    for (let s = 0; s < 2; s++)
      for (let t = 0; t < 2; t++)
        for (let i = 0; i < 3; i++)
          for (let j = 0; j < 3; j++) {
            const q = across ? across[e] : 0;
            const v = (k[e] - q) * units[3 * e + i] * units[3 * e + j] + (i === j ? q : 0);
            put(
              freedoms.of[3 * figure.ends[2 * e + s] + i],
              freedoms.of[3 * figure.ends[2 * e + t] + j],
              s === t ? v : -v,
            );
          }
  return fromTriplets(freedoms.count, freedoms.count, rows, columns, values);
}

const factorPin = (figure: PinFigure, freedoms: Freedoms, k: SparseMatrix): Factor =>
  factorise(analyse(k, { blockStarts: freedoms.blockStarts, points: blockPoints(freedoms, figure.nodes) }), k);

/** Adds what prestressed bars pull sideways once their ends have moved: t/L times the relative displacement square to the bar. */
function addSidePulls(
  p: Float64Array,
  figure: PinFigure,
  units: Float64Array,
  lengths: Float64Array,
  prestress: ArrayLike<number>,
  d: Float64Array,
): void {
  for (let e = 0; e < lengths.length; e++) {
    const [a, b] = [3 * figure.ends[2 * e], 3 * figure.ends[2 * e + 1]];
    const along = elongation(figure, units, d, e);
    for (let i = 0; i < 3; i++) {
      const pull = (prestress[e] / lengths[e]) * (d[b + i] - d[a + i] - along * units[3 * e + i]);
      p[a + i] += pull;
      p[b + i] -= pull;
    }
  }
}

/** p + A (EA/L) e0 over all nodes. */
function rightSide(truss: PinTruss, c: PinLoads, k: Float64Array, units: Float64Array): Float64Array {
  const p = c.forces.slice();
  const push = c.freeElongation?.map((e0, e) => k[e] * e0);
  if (push) addBarForces(p, truss, units, push, -1);
  return p;
}

/** (EA/L)(Aᵀ d - e0) of every bar, N. */
const strained = (truss: PinTruss, units: Float64Array, k: Float64Array, d: Float64Array, c: PinLoads): Float64Array =>
  k.map((ke, e) => ke * (elongation(truss, units, d, e) - (c.freeElongation?.[e] ?? 0)));

const nodeOf = (freedoms: Freedoms, freedom: number): number => Math.floor(freedoms.of.indexOf(freedom) / 3);

/** The unknown of the least pivot. */
function weakest(factor: Factor): number {
  const { analysis, values } = factor;
  let [least, at] = [Infinity, 0];
  for (let s = 0; s < analysis.parent.length; s++) {
    const width = analysis.starts[s + 1] - analysis.starts[s];
    for (let k = 0; k < width; k++) {
      const d = Math.abs(values[analysis.factorStarts[s] + k * width + k]);
      if (d < least) [least, at] = [d, analysis.order[analysis.starts[s] + k]];
    }
  }
  return at;
}

/** u · (d_to - d_from) of bar e, mm. */
function elongation(figure: PinFigure, units: Float64Array, d: Float64Array, e: number): number {
  const [a, b] = [3 * figure.ends[2 * e], 3 * figure.ends[2 * e + 1]];
  let sum = 0;
  for (let i = 0; i < 3; i++) sum += units[3 * e + i] * (d[b + i] - d[a + i]);
  return sum;
}

/** Adds `sign` times the pull of the bars' forces on their nodes to p. */
export function addBarForces(
  p: Float64Array,
  figure: PinFigure,
  units: Float64Array,
  axial: ArrayLike<number>,
  sign: 1 | -1,
): void {
  for (let e = 0; e < figure.ends.length / 2; e++)
    for (let i = 0; i < 3; i++) {
      p[3 * figure.ends[2 * e] + i] += sign * axial[e] * units[3 * e + i];
      p[3 * figure.ends[2 * e + 1] + i] -= sign * axial[e] * units[3 * e + i];
    }
}
