import { orthonormalise } from '../maths/sparse/orthonormalise.js';
import type { PinFigure } from './pin-figure.js';

/** Rigid motions with a singular value below this share of the largest leave the supports (or the figure) unmoved. */
const RANK_CUT = 1e-9;

/**
 * Motions of the nodes as one body that the supports leave free: an orthonormal basis, three numbers a node over all
 * nodes. `within` names the nodes that count (a connected piece); absent: all. Six for a free figure in space, fewer for
 * nodes on one line, none where held.
 */
export function rigidMotions(figure: PinFigure, within?: readonly number[]): Float64Array[] {
  const count = figure.nodes.length / 3;
  const nodes = within ?? Array.from({ length: count }, (_, i) => i);
  const centre = [0, 0, 0];
  for (const n of nodes) for (let k = 0; k < 3; k++) centre[k] += figure.nodes[3 * n + k] / Math.max(1, nodes.length);
  let size = 0;
  for (const n of nodes)
    for (let k = 0; k < 3; k++) size = Math.max(size, Math.abs(figure.nodes[3 * n + k] - centre[k]));
  const scale = size > 0 ? 1 / size : 1;
  const all = Array.from({ length: 6 }, () => new Float64Array(3 * count));
  for (const n of nodes) {
    const [x, y, z] = [0, 1, 2].map((k) => (figure.nodes[3 * n + k] - centre[k]) * scale);
    for (let k = 0; k < 3; k++) all[k][3 * n + k] = 1;
    all[3].set([0, -z, y], 3 * n);
    all[4].set([z, 0, -x], 3 * n);
    all[5].set([-y, x, 0], 3 * n);
  }
  // Distinct motions first (nodes on a line have five), then those among them that move no held freedom.
  const motions = independent(all);
  const held = motions.map((v) => Float64Array.from(v, (d, k) => (figure.fixed[k] ? d : 0)));
  return nullCombinations(held).map((w) => combine(motions, w));
}

/** Orthonormal vectors that span the given ones. */
function independent(vectors: readonly Float64Array[]): Float64Array[] {
  const out: Float64Array[] = [];
  for (const v of vectors) {
    const trial = orthonormalise([...out, v], undefined);
    const own = trial.triangle[out.length][out.length];
    if (own > RANK_CUT * Math.sqrt(v.length)) out.push(trial.vectors[out.length]);
  }
  return out;
}

/** Weights w with sum w_k v_k = 0, orthonormal: null space of a thin matrix, by Jacobi rotations of its columns (Hestenes 1958). */
function nullCombinations(vectors: readonly Float64Array[]): number[][] {
  const n = vectors.length;
  const v = vectors.map((x) => x.slice());
  const w = v.map((_, i) => Array.from({ length: n }, (_, j) => (i === j ? 1 : 0)));
  for (let sweep = 0; sweep < 30; sweep++) {
    let off = 0;
    for (let p = 0; p < n; p++)
      for (let q = p + 1; q < n; q++) {
        const [app, aqq, apq] = [dot(v[p], v[p]), dot(v[q], v[q]), dot(v[p], v[q])];
        if (Math.abs(apq) <= 1e-16 * Math.sqrt(app * aqq)) continue;
        off = Math.max(off, Math.abs(apq) / Math.sqrt(app * aqq));
        const zeta = (aqq - app) / (2 * apq);
        const t = Math.sign(zeta || 1) / (Math.abs(zeta) + Math.sqrt(1 + zeta * zeta));
        const c = 1 / Math.sqrt(1 + t * t);
        rotate(v[p], v[q], c, c * t);
        rotate(w[p], w[q], c, c * t);
      }
    if (off < 1e-15) break;
  }
  return w.filter((_, k) => Math.sqrt(dot(v[k], v[k])) <= RANK_CUT);
}

function rotate(a: Float64Array | number[], b: Float64Array | number[], c: number, s: number): void {
  for (let i = 0; i < a.length; i++) {
    const [x, y] = [a[i], b[i]];
    a[i] = c * x - s * y;
    b[i] = s * x + c * y;
  }
}

function combine(vectors: readonly Float64Array[], weights: readonly number[]): Float64Array {
  const out = new Float64Array(vectors[0].length);
  weights.forEach((w, k) => {
    for (let i = 0; i < out.length; i++) out[i] += w * vectors[k][i];
  });
  return out;
}

function dot(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}
