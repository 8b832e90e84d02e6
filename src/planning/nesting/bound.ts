import { areaOf, offsetRings } from '../../maths/polygon/boolean.js';
import { isConvex } from '../../maths/polygon/convex.js';
import { perimeter, type Ring, signedArea } from '../../maths/polygon/ring.js';

/**
 * Area in mm² that an outline takes up with half the spacing round it. Convex: A + P s/2 + π s²/4 (Steiner). Else by
 * offsetting; the chords drawn inside its arcs make that a little small, never large, as a bound needs.
 */
export function grownArea(ring: Ring, spacing: number): number {
  if (spacing === 0) return signedArea(ring);
  if (isConvex(ring, 0)) return signedArea(ring) + (perimeter(ring) * spacing) / 2 + (Math.PI * spacing * spacing) / 4;
  return Math.max(signedArea(ring), areaOf(offsetRings([ring], spacing / 2, 'round')));
}

/**
 * A number of sheets that no plan can go below. `areas` of the pieces grown by half the spacing; `sheets` are the
 * sizes on hand, largest counted first, with their usable area grown likewise. For one size also the bound L2 of
 * Martello and Toth (Discrete Applied Mathematics 28, 1990): pieces that pairwise exceed a sheet's area need a sheet each.
 */
export function sheetBound(
  areas: readonly number[],
  sheets: readonly { readonly area: number; readonly available: number }[],
): number {
  if (areas.length === 0) return 0;
  const total = areas.reduce((a, b) => a + b, 0);
  const sorted = [...sheets].filter((s) => s.available > 0 && s.area > 0).sort((a, b) => b.area - a.area);
  if (sorted.length === 0) return 0;
  let left = total * (1 - AREA_ROUND_OFF);
  let count = 0;
  for (const s of sorted) {
    const use = Math.min(s.available, Math.ceil(left / s.area));
    count += use;
    left -= use * s.area;
    if (left <= 0) break;
  }
  return Math.max(1, count, pairwiseBound(areas, sorted[0]!.area * (1 + AREA_ROUND_OFF)));
}

/** Round-off of a sum of areas must not cost a sheet where pieces fill sheets exactly. */
const AREA_ROUND_OFF = 1e-9;

function pairwiseBound(areas: readonly number[], sheet: number): number {
  let best = 0;
  for (const k of [0, ...areas.filter((a) => a <= sheet / 2)]) {
    let big = 0;
    let half = 0;
    let halfArea = 0;
    let small = 0;
    for (const a of areas) {
      if (a > sheet - k) big++;
      else if (a > sheet / 2) {
        half++;
        halfArea += a;
      } else if (a >= k) small += a;
    }
    best = Math.max(
      best,
      big + half + Math.max(0, Math.ceil((small - (half * sheet - halfArea)) / sheet - AREA_ROUND_OFF)),
    );
  }
  return best;
}
