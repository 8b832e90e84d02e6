import { solveCholesky } from '../../maths/cholesky.js';
import { gaussLegendre } from '../../maths/gauss-legendre.js';
import type { Point2 } from '../../model/parts.js';
import { BASIS, type BasisAt, type Box, basisAt, DEGREE } from './plate-basis.js';

/** What holds a plate: edges that rest (by the index of their first corner) and points; mm. Both let it turn. */
export interface PlateSupports {
  readonly edges: readonly number[];
  readonly points: readonly Point2[];
}

/** A thin plate under a pressure of 1 MPa with a bending stiffness D of 1 N mm: multiply by q / D, q and q. */
export interface PlateResponse {
  /** Largest deflection, mm for q/D = 1 mm⁻³. */
  readonly deflection: number;
  /** Largest principal bending moment, N mm/mm for q = 1 MPa. */
  readonly moment: number;
  /** Force on each point, N for q = 1 MPa, in the points' order. */
  readonly forces: readonly number[];
  /** Force on all held edges together, N for q = 1 MPa. */
  readonly edgeForce: number;
}

/** A plate whose energy is known; `bend` answers for one way of holding it, null where that leaves it loose. */
export interface Plate {
  bend(supports: PlateSupports): PlateResponse | null;
}

/** Exact for the energy: products of second derivatives have degree 2 (DEGREE - 2), Duffy's map adds one. */
const GAUSS = gaussLegendre(DEGREE - 1);
/** Along held edges: products of values have degree 2 DEGREE. */
const GAUSS_EDGE = gaussLegendre(DEGREE + 1);
/** Springs that stand for supports, over D / L³ and D / L⁴ with L half the plate's size: stiff enough that their own give is below 0.1 %. */
const STIFF = 1e6;
/** Deflection over q L⁴ / D of a plate that nothing holds in some direction: round-off lets it through the factorisation with huge values. A cantilever of the whole size stays below 2. */
const LOOSE = 1e3;
/** Points looked at along each edge. */
const ALONG = 8;

/**
 * A thin plate of any simple outline by Ritz's method (Timoshenko and Woinowsky-Krieger, Theory of Plates and Shells, 82):
 * w as a sum of Legendre products of total degree up to 8 that makes D/2 ∫ (Δw)² - 2 (1 - nu)(w_xx w_yy - w_xy²) - q w least, free
 * edges by nature, held ones by stiff springs. Integrals over the outline are sums over signed triangles, exact for polynomials.
 * Peaks of moment right at a point support are rounded off, as they are by a washer.
 *
 * @param outline mm, in either sense, first point not repeated; @param nu Poisson's ratio of the sheet
 * @returns null where the outline has no area
 */
export function plateOf(outline: readonly Point2[], nu: number): Plate | null {
  const box = boxOf(outline);
  if (!(Math.min(box.halfX, box.halfY) > 0)) return null;
  const { points, weights } = areaPoints(outline, box);
  const area = weights.reduce((sum, w) => sum + w, 0);
  if (area === 0) return null;
  // Everything in lengths of box.size, D = q = 1. An outline that runs clockwise has negative weights.
  const inside = basisAt(box, points);
  const energy = new Float64Array(BASIS * BASIS);
  const load = new Float64Array(BASIS);
  weights.forEach((weight, k) => {
    const w = area > 0 ? weight : -weight;
    addBending(energy, inside, k, w, nu);
    for (let p = 0; p < BASIS; p++) load[p]! += w * inside.w[k * BASIS + p]!;
  });
  const [mx, my] = [0, 1].map((k) => weights.reduce((sum, w, i) => sum + w * points[2 * i + k]!, 0) / area);
  // The peak is often right in the middle, where no point of quadrature lies.
  const around = basisAt(box, [...edgePoints(outline), mx!, my!]);

  return {
    bend({ edges, points: held }) {
      const stiffness = energy.slice();
      const alongEdges = new Float64Array(BASIS);
      for (const e of edges) addEdge(stiffness, alongEdges, box, outline[e]!, outline[(e + 1) % outline.length]!);
      const at = basisAt(box, held.flat());
      for (let k = 0; k < at.count; k++) addSpring(stiffness, at.w, k, STIFF);
      const c = solveCholesky(stiffness, load.slice());
      if (c === null) return null;
      const [a, b] = [peaks(inside, c, nu), peaks(around, c, nu)];
      const reached = Math.max(a.deflection, b.deflection);
      if (!(reached < LOOSE)) return null;
      const { size } = box;
      return {
        deflection: reached * size ** 4,
        moment: Math.max(a.moment, b.moment) * size ** 2,
        forces: held.map((_, k) => STIFF * rowDot(at.w, k, c) * size ** 2),
        edgeForce: rowDot(alongEdges, 0, c) * size ** 2,
      };
    },
  };
}

/** Points and weights of the integral over the outline: a fan of signed triangles from its first corner, each by Duffy's map of the square. */
function areaPoints(outline: readonly Point2[], { size }: Box): { points: number[]; weights: number[] } {
  const points: number[] = [];
  const weights: number[] = [];
  const [ox, oy] = outline[0]!;
  for (let i = 1; i + 1 < outline.length; i++) {
    const [ux, uy] = [outline[i]![0] - ox, outline[i]![1] - oy];
    const [vx, vy] = [outline[i + 1]![0] - ox, outline[i + 1]![1] - oy];
    const twice = (ux * vy - uy * vx) / size ** 2;
    if (twice === 0) continue;
    GAUSS.points.forEach((gs, k) => {
      const s = (1 + gs) / 2;
      GAUSS.points.forEach((gt, m) => {
        const t = (1 + gt) / 2;
        points.push(ox + s * (ux + t * (vx - ux)), oy + s * (uy + t * (vy - uy)));
        weights.push((GAUSS.weights[k]! * GAUSS.weights[m]! * s * twice) / 4);
      });
    });
  }
  return { points, weights };
}

/** Points along the outline, corners among them. */
const edgePoints = (outline: readonly Point2[]): number[] =>
  outline.flatMap((a, i) => {
    const b = outline[(i + 1) % outline.length]!;
    return Array.from({ length: ALONG }, (_, k) => [
      a[0] + (k / ALONG) * (b[0] - a[0]),
      a[1] + (k / ALONG) * (b[1] - a[1]),
    ]).flat();
  });

/** Adds the bending energy at point k to the lower triangle. */
function addBending(into: Float64Array, { xx, yy, xy }: BasisAt, k: number, weight: number, nu: number): void {
  const row = k * BASIS;
  for (let p = 0; p < BASIS; p++) {
    const mx = weight * (xx[row + p]! + nu * yy[row + p]!);
    const my = weight * (yy[row + p]! + nu * xx[row + p]!);
    const mxy = weight * 2 * (1 - nu) * xy[row + p]!;
    const at = p * BASIS;
    for (let q = 0; q <= p; q++) into[at + q]! += mx * xx[row + q]! + my * yy[row + q]! + mxy * xy[row + q]!;
  }
}

/** Adds a spring at point k to the lower triangle. */
function addSpring(into: Float64Array, w: Float64Array, k: number, stiff: number): void {
  const row = k * BASIS;
  for (let p = 0; p < BASIS; p++) {
    const f = stiff * w[row + p]!;
    for (let q = 0; q <= p; q++) into[p * BASIS + q]! += f * w[row + q]!;
  }
}

/** Adds springs along an edge, and the force in them for each coefficient. */
function addEdge(into: Float64Array, force: Float64Array, box: Box, a: Point2, b: Point2): void {
  const half = Math.hypot(b[0] - a[0], b[1] - a[1]) / 2 / box.size;
  const along = Array.from(GAUSS_EDGE.points).flatMap((g) => {
    const s = (1 + g) / 2;
    return [a[0] + s * (b[0] - a[0]), a[1] + s * (b[1] - a[1])];
  });
  const at = basisAt(box, along);
  for (let k = 0; k < at.count; k++) {
    const stiff = STIFF * GAUSS_EDGE.weights[k]! * half;
    addSpring(into, at.w, k, stiff);
    for (let p = 0; p < BASIS; p++) force[p]! += stiff * at.w[k * BASIS + p]!;
  }
}

function rowDot(rows: Float64Array, k: number, c: Float64Array): number {
  let sum = 0;
  for (let p = 0; p < BASIS; p++) sum += rows[k * BASIS + p]! * c[p]!;
  return sum;
}

/** Largest deflection and principal moment over some points. */
function peaks(at: BasisAt, c: Float64Array, nu: number): { deflection: number; moment: number } {
  let [deflection, moment] = [0, 0];
  for (let k = 0; k < at.count; k++) {
    deflection = Math.max(deflection, Math.abs(rowDot(at.w, k, c)));
    const [kx, ky, kxy] = [rowDot(at.xx, k, c), rowDot(at.yy, k, c), rowDot(at.xy, k, c)];
    const middle = ((1 + nu) * (kx + ky)) / 2;
    const radius = (1 - nu) * Math.hypot((kx - ky) / 2, kxy);
    moment = Math.max(moment, Math.abs(middle) + radius);
  }
  return { deflection, moment };
}

function boxOf(outline: readonly Point2[]): Box {
  const xs = outline.map((p) => p[0]);
  const ys = outline.map((p) => p[1]);
  const [x0, x1, y0, y1] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  const [halfX, halfY] = [(x1 - x0) / 2, (y1 - y0) / 2];
  return { x: (x0 + x1) / 2, y: (y0 + y1) / 2, halfX, halfY, size: Math.max(halfX, halfY) };
}
