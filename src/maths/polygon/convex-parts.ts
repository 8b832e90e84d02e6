import { isConvex, turn } from './convex.js';
import { type Ring, signedArea } from './ring.js';

/**
 * Convex anticlockwise rings that cover a simple anticlockwise ring without overlap: triangles by ear clipping
 * (Meisters 1975), merged across each diagonal whose removal leaves both ends convex (Hertel and Mehlhorn 1983;
 * at most four times the fewest parts). A ring that crosses itself gives some cover of it, not an exact one.
 */
export function convexParts(ring: Ring): Ring[] {
  const slack = 1e-12 * Math.abs(signedArea(ring));
  if (isConvex(ring, slack)) return [ring];
  return merge(ring, triangles(ring), slack).map((part) => {
    const out = new Float64Array(part.length * 2);
    part.forEach((v, i) => {
      out[2 * i] = ring[2 * v]!;
      out[2 * i + 1] = ring[2 * v + 1]!;
    });
    return out;
  });
}

const at = (r: Ring, a: number, b: number, c: number): number =>
  turn(r[2 * a]!, r[2 * a + 1]!, r[2 * b]!, r[2 * b + 1]!, r[2 * c]!, r[2 * c + 1]!);

function triangles(ring: Ring): number[][] {
  const left = Array.from({ length: ring.length / 2 }, (_, i) => i);
  const out: number[][] = [];
  while (left.length > 3) {
    const n = left.length;
    let best = -1;
    let bestShape = -Infinity;
    for (let i = 0; i < n; i++) {
      const [a, b, c] = [left[(i + n - 1) % n]!, left[i]!, left[(i + 1) % n]!];
      const area = at(ring, a, b, c);
      if (area <= 0) continue;
      const clear = left.every(
        (v) =>
          v === a || v === b || v === c || at(ring, a, b, v) < 0 || at(ring, b, c, v) < 0 || at(ring, c, a, v) <= 0,
      );
      if (!clear) continue;
      // The plumpest ear first: slivers make poor parts.
      const long = Math.hypot(ring[2 * a]! - ring[2 * c]!, ring[2 * a + 1]! - ring[2 * c + 1]!);
      const shape = area / (long * long || 1);
      if (shape > bestShape) {
        bestShape = shape;
        best = i;
      }
    }
    // Round-off or a self-crossing ring can hide every ear: drop the flattest corner and go on.
    if (best < 0) {
      let least = Infinity;
      for (let i = 0; i < n; i++) {
        const area = Math.abs(at(ring, left[(i + n - 1) % n]!, left[i]!, left[(i + 1) % n]!));
        if (area < least) {
          least = area;
          best = i;
        }
      }
    }
    const [a, b, c] = [left[(best + n - 1) % n]!, left[best]!, left[(best + 1) % n]!];
    if (at(ring, a, b, c) > 0) out.push([a, b, c]);
    left.splice(best, 1);
  }
  if (at(ring, left[0]!, left[1]!, left[2]!) > 0) out.push([left[0]!, left[1]!, left[2]!]);
  return out;
}

function merge(ring: Ring, parts: number[][], slack: number): number[][] {
  for (let again = true; again; ) {
    again = false;
    search: for (let p = 0; p < parts.length; p++)
      for (let q = p + 1; q < parts.length; q++) {
        const joined = join(ring, parts[p]!, parts[q]!, slack);
        if (!joined) continue;
        parts[p] = joined;
        parts.splice(q, 1);
        again = true;
        break search;
      }
  }
  return parts;
}

function join(ring: Ring, a: number[], b: number[], slack: number): number[] | null {
  for (let i = 0; i < a.length; i++) {
    const u = a[i]!;
    const v = a[(i + 1) % a.length]!;
    const k = b.indexOf(v);
    if (k < 0 || b[(k + 1) % b.length] !== u) continue;
    // a runs u -> v, b runs v -> u: walk a from v round to u, then b from u round to v.
    const out: number[] = [];
    for (let s = 0; s < a.length; s++) out.push(a[(i + 1 + s) % a.length]!);
    for (let s = 2; s < b.length; s++) out.push(b[(k + s) % b.length]!);
    const n = out.length;
    for (let s = 0; s < n; s++) if (at(ring, out[s]!, out[(s + 1) % n]!, out[(s + 2) % n]!) < -slack) return null;
    return out;
  }
  return null;
}
