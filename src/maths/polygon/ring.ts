/** A closed polygon as x0 y0 x1 y1 ..., first corner not repeated. Anticlockwise: the inside is on the left. */
export type Ring = Float64Array;

/** Corners [x, y] as a ring, in the order given. */
export function toRing(points: readonly (readonly [number, number])[]): Ring {
  const ring = new Float64Array(points.length * 2);
  points.forEach((p, i) => {
    ring[2 * i] = p[0];
    ring[2 * i + 1] = p[1];
  });
  return ring;
}

/** The corners of a ring as [x, y]. */
export function toPoints(ring: Ring): [number, number][] {
  const points: [number, number][] = [];
  for (let i = 0; i < ring.length; i += 2) points.push([ring[i]!, ring[i + 1]!]);
  return points;
}

/** 1/2 Σ (x_i y_i+1 - x_i+1 y_i): positive when anticlockwise. Taken about the first corner, so that a far origin costs no digits. */
export function signedArea(ring: Ring): number {
  const ox = ring[0] ?? 0;
  const oy = ring[1] ?? 0;
  let sum = 0;
  for (let i = 2; i + 3 < ring.length; i += 2)
    sum += (ring[i]! - ox) * (ring[i + 3]! - oy) - (ring[i + 2]! - ox) * (ring[i + 1]! - oy);
  return sum / 2;
}

/** Σ |p_i+1 - p_i| */
export function perimeter(ring: Ring): number {
  let sum = 0;
  const n = ring.length;
  for (let i = 0; i < n; i += 2) sum += Math.hypot(ring[(i + 2) % n]! - ring[i]!, ring[(i + 3) % n]! - ring[i + 1]!);
  return sum;
}

/** The same polygon run the other way. */
export function reversed(ring: Ring): Ring {
  const out = new Float64Array(ring.length);
  for (let i = 0; i < ring.length; i += 2) {
    out[ring.length - 2 - i] = ring[i]!;
    out[ring.length - 1 - i] = ring[i + 1]!;
  }
  return out;
}

/** R(angle) p + (dx, dy) for every corner; angle in rad, anticlockwise. */
export function movedRing(ring: Ring, angle: number, dx: number, dy: number): Ring {
  const c = Math.cos(angle);
  const s = Math.sin(angle);
  const out = new Float64Array(ring.length);
  for (let i = 0; i < ring.length; i += 2) {
    out[i] = c * ring[i]! - s * ring[i + 1]! + dx;
    out[i + 1] = s * ring[i]! + c * ring[i + 1]! + dy;
  }
  return out;
}

/** [least x, least y, greatest x, greatest y]; of no corners: an empty box (+inf, -inf). */
export function boundsOf(ring: Ring): [number, number, number, number] {
  let [x0, y0, x1, y1] = [Infinity, Infinity, -Infinity, -Infinity];
  for (let i = 0; i < ring.length; i += 2) {
    x0 = Math.min(x0, ring[i]!);
    x1 = Math.max(x1, ring[i]!);
    y0 = Math.min(y0, ring[i + 1]!);
    y1 = Math.max(y1, ring[i + 1]!);
  }
  return [x0, y0, x1, y1];
}
