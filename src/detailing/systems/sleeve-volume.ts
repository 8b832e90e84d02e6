import { addScaled, scale } from '../../maths/vec3.js';
import { plateVolume } from './base-plate.js';
import type { HubShape } from './hub-shape.js';
import { areaOf, type Half, largest, type Sleeve } from './sleeve.js';
import { bodyHull } from './sleeve-cover.js';
import { between, insidePlanes, insideSleeve } from './sleeve-inside.js';

/**
 * Volume of a hub's plastic, mm³: the body's hull, plus each sleeve where it stands out of the hull, shared evenly where sleeves
 * overlap, less the bores and pin holes. Sleeves are summed over a fixed grid of points of equal volume: 8 along each of cone and
 * tube, 12 round, 3 across; within 2 % of the solid on hubs of 2 to 12 sleeves.
 */
export function sleeveVolume(shape: HubShape): number {
  const { sleeves, base } = shape;
  const hull = bodyHull(shape, 12);
  const planes = hull?.planes ?? new Float64Array(0);
  // A 12-gon that contains its circle is too large by this share of the area.
  let volume = (hull?.volume ?? 0) / polygonExcess(12) + (base ? plateVolume(base) : 0);
  for (const s of sleeves) {
    for (const [from, to, low, high] of stretches(s)) {
      if (to <= from) continue;
      for (let i = 0; i < ALONG; i++) {
        const t = (i + 0.5) / ALONG;
        const half = between(low, high, t);
        const slice = (areaOf(half) * (to - from)) / ALONG / (ROUND * ACROSS);
        const centre = scale(s.socket.direction, from + t * (to - from));
        for (const [a, b] of gridOf(half)) {
          const p = addScaled(addScaled(centre, s.socket.y, a), s.socket.z, b);
          if (insidePlanes(planes, p)) continue;
          let share = 1;
          for (const other of sleeves) if (other !== s && insideSleeve(other, p)) share++;
          volume += slice / share;
        }
      }
    }
    if (s.hollow) volume -= areaOf(s.inner) * (s.mouth - s.stop);
    const { pin, wall } = s.socket;
    const across = s.hollow ? 2 * wall : 2 * largest(s.outer);
    volume -= ((Math.PI * pin * pin) / 4) * across;
  }
  return Math.max(volume, 0);
}

const ALONG = 8;
const ROUND = 12;
const ACROSS = 3;

const polygonExcess = (sides: number): number => (Math.tan(Math.PI / sides) * sides) / Math.PI;

const stretches = (s: Sleeve): readonly (readonly [number, number, Half, Half])[] => [
  [s.root, s.coneFoot, s.rootHalf, s.cone],
  [s.coneFoot, s.coneTop, s.cone, s.outer],
  [s.coneTop, s.mouth, s.outer, s.outer],
];

/** Centres of cells of equal area. */
function* gridOf(half: Half): Generator<readonly [number, number]> {
  for (let k = 0; k < ACROSS; k++)
    for (let m = 0; m < ROUND; m++) {
      if (typeof half === 'number') {
        const r = half * Math.sqrt((k + 0.5) / ACROSS);
        const angle = (2 * Math.PI * (m + 0.5)) / ROUND;
        yield [r * Math.cos(angle), r * Math.sin(angle)];
      } else yield [half[0] * (((k + 0.5) / ACROSS) * 2 - 1), half[1] * (((m + 0.5) / ROUND) * 2 - 1)];
    }
}
