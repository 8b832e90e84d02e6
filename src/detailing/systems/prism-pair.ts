import { cross, dot, length, scale, type Vec3 } from '../../maths/vec3.js';

/** A bar as a half-infinite prism along d: half-sizes along u and v, or a radius. Unit vectors, mm. */
export interface BarPrism {
  readonly d: Vec3;
  readonly u: Vec3;
  readonly v: Vec3;
  readonly half: readonly [number, number] | number;
}

/** Half-width of the bar's section in direction m: its support function without the part along d. */
function halfWidth(bar: BarPrism, m: Vec3): number {
  if (typeof bar.half === 'number') return bar.half * Math.hypot(dot(m, bar.u), dot(m, bar.v));
  return bar.half[0] * Math.abs(dot(m, bar.u)) + bar.half[1] * Math.abs(dot(m, bar.v));
}

/** One separating direction of a pair: with setbacks s1, s2 the bars are apart along it when a s1 + b s2 >= need. */
export interface Separation {
  readonly a: number;
  readonly b: number;
  readonly need: number;
}

/**
 * Separating directions of two prisms whose axes meet: unit m with m·d1 <= 0 <= m·d2. Along m the bars are
 * s1 (-m·d1) + s2 (m·d2) - H1(m) - H2(m) apart. By the separating axis theorem (Gottschalk, Lin and Manocha 1996) the face normals
 * of both prisms and the cross products of their edges suffice for polygonal sections and no gap; with a gap the answer is safe.
 * A round bar counts as a prism of 16 sides for the directions, and as round for its width.
 */
export function separations(one: BarPrism, two: BarPrism, gap: number): Separation[] {
  const axes1 = axesOf(one);
  const axes2 = axesOf(two);
  const candidates: Vec3[] = [...axes1, ...axes2];
  for (const p of axes1) for (const q of axes2) candidates.push(cross(p, q));
  const result: Separation[] = [];
  for (const raw of candidates) {
    const l = length(raw);
    if (l < PARALLEL) continue;
    for (const sign of [1, -1]) {
      const m = scale(raw, sign / l);
      const a = -dot(m, one.d);
      const b = dot(m, two.d);
      if (a < -PARALLEL || b < -PARALLEL || a + b < PARALLEL) continue;
      result.push({ a: Math.max(a, 0), b: Math.max(b, 0), need: halfWidth(one, m) + halfWidth(two, m) + gap });
    }
  }
  return result;
}

/** Setback that serves both alike. */
export const commonOf = (list: readonly Separation[]): number => Math.min(...list.map((s) => s.need / (s.a + s.b)));

/** Least setback of the first bar while the second starts at s2; -Infinity where any will do. */
export function leastOf(list: readonly Separation[], s2: number): number {
  let best = Number.POSITIVE_INFINITY;
  for (const s of list) {
    const rest = s.need - s.b * s2;
    if (rest <= 0) return Number.NEGATIVE_INFINITY;
    if (s.a > 0) best = Math.min(best, rest / s.a);
  }
  return best;
}

/** Below this sine two directions are one: round-off of unit vectors. */
const PARALLEL = 1e-9;

function axesOf(bar: BarPrism): Vec3[] {
  if (typeof bar.half !== 'number') return [bar.d, bar.u, bar.v];
  const axes: Vec3[] = [bar.d];
  for (let k = 0; k < 8; k++) {
    const [c, s] = [Math.cos((k * Math.PI) / 8), Math.sin((k * Math.PI) / 8)];
    axes.push([c * bar.u[0] + s * bar.v[0], c * bar.u[1] + s * bar.v[1], c * bar.u[2] + s * bar.v[2]]);
  }
  return axes;
}
