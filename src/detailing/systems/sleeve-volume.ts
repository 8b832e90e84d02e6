import { scale, type Vec3 } from '../../maths/vec3.js';
import { plateVolume } from './base-plate.js';
import { type ClampParts, SCREW } from './clamp-parts.js';
import type { HubShape } from './hub-shape.js';
import { insideAll, mayTouch, planesCutting, reachOf } from './section-reach.js';
import { areaOf, type Half, largest, type Sleeve } from './sleeve.js';
import { bodyHull } from './sleeve-cover.js';
import { between, insidePath, insidePlanes, insideSleeve } from './sleeve-inside.js';

/**
 * Volume of a hub's plastic, mm³: the body's hull, plus each sleeve where it stands out of the hull, shared evenly where sleeves
 * overlap, less the bores and pin holes. Sleeves are summed over a fixed grid of points of equal volume: 8 along each of cone and
 * tube, 12 round, 3 across; within 2 % of the solid on hubs of 2 to 12 sleeves.
 */
export function sleeveVolume(shape: HubShape): number {
  const { sleeves, base, clamp } = shape;
  const hull = bodyHull(shape, 12);
  const planes = hull?.planes ?? new Float64Array(0);
  // A 12-gon that contains its circle is too large by this share of the area.
  let volume = (hull?.volume ?? 0) / polygonExcess(12) + (base ? plateVolume(base) : 0);
  const p: [number, number, number] = [0, 0, 0]; // one for all points
  for (const s of sleeves) {
    for (const [from, to, low, high] of stretches(s)) {
      if (to <= from) continue;
      for (let i = 0; i < ALONG; i++) {
        const t = (i + 0.5) / ALONG;
        const half = between(low, high, t);
        const slice = (areaOf(half) * (to - from)) / ALONG / (ROUND * ACROSS);
        const centre = scale(s.socket.direction, from + t * (to - from));
        const { grid, sizeA, sizeB } = gridAcross(half);
        // Most planes and sleeves lie wholly on one side of a slice: its points are held against the others alone.
        const reach = reachOf(half);
        const cutting = planesCutting(planes, centre, reach);
        const others = sleeves.filter((o) => o !== s && mayTouch(o, centre, reach));
        for (let g = 0; g < grid.length; g += 2) {
          pointAcross(p, centre, s, sizeA * grid[g]!, sizeB * grid[g + 1]!);
          const share = cutting && insideAll(cutting, p) ? 0 : sharers(others, p);
          if (share > 0) volume += slice / share;
        }
      }
    }
    if (s.hollow) volume -= areaOf(s.inner) * (s.mouth - s.stop);
    volume -= pathThroughBody(s, planes, s.hollow ? s.mouth : s.stop);
    const { pin, wall } = s.socket;
    const across = s.hollow ? 2 * wall : 2 * largest(s.outer);
    volume -= ((Math.PI * pin * pin) / 4) * across;
  }
  if (clamp) volume += armsVolume(clamp, sleeves, planes);
  return Math.max(volume, 0);
}

/** Sleeves that a point of one of them lies in, itself among them; none where another's path takes the plastic away. */
function sharers(others: readonly Sleeve[], p: Vec3): number {
  let share = 1;
  for (let i = 0; i < others.length; i++) {
    if (insidePath(others[i]!, p)) return 0;
    if (insideSleeve(others[i]!, p)) share++;
  }
  return share;
}

/** Points a side of the grid that an arm is summed over. */
const GRID = 16;

/** mm³ of a clamp's arms outside body, sleeves, paths and one another, less the screws' holes. */
function armsVolume(clamp: ClampParts, sleeves: readonly Sleeve[], planes: Float64Array): number {
  let volume = 0;
  clamp.arms.forEach((arm, index) => {
    const [low, high] = [0, 1].map((side) =>
      [0, 1, 2].map((k) => (side === 0 ? Math.min : Math.max)(...arm.points.map((p) => p[k]!))),
    ) as [number[], number[]];
    const step = [0, 1, 2].map((k) => (high[k]! - low[k]!) / GRID);
    const cell = step[0]! * step[1]! * step[2]!;
    for (let i = 0; i < GRID; i++)
      for (let j = 0; j < GRID; j++)
        for (let k = 0; k < GRID; k++) {
          const p: Vec3 = [
            low[0]! + (i + 0.5) * step[0]!,
            low[1]! + (j + 0.5) * step[1]!,
            low[2]! + (k + 0.5) * step[2]!,
          ];
          if (!insidePlanes(arm.planes, p) || insidePlanes(planes, p)) continue;
          if (clamp.arms.some((other, o) => o < index && insidePlanes(other.planes, p))) continue;
          if (sleeves.some((s) => insideSleeve(s, p) || insidePath(s, p))) continue;
          volume += cell;
        }
  });
  const hole = (Math.PI / 4) * ((SCREW.clear ** 2 + SCREW.thread ** 2) / 2) * 2 * clamp.half;
  return volume - hole * clamp.screws.length;
}

/** mm³ of the body that a strut's path takes beyond its own sleeve. */
function pathThroughBody(s: Sleeve, planes: Float64Array, from: number): number {
  const p: [number, number, number] = [0, 0, 0];
  let volume = 0;
  for (let at = from + STEP / 2; ; at += STEP) {
    const centre = scale(s.socket.direction, at);
    let hits = 0;
    const { grid, sizeA, sizeB } = gridAcross(s.inner);
    const cutting = planesCutting(planes, centre, reachOf(s.inner));
    for (let g = 0; cutting && g < grid.length; g += 2) {
      pointAcross(p, centre, s, sizeA * grid[g]!, sizeB * grid[g + 1]!);
      // A spigot stands in its own strut's path and fills it again.
      if (insideAll(cutting, p) && !insideSleeve(s, p)) hits++;
    }
    if (hits === 0) return volume;
    volume += (areaOf(s.inner) * STEP * hits) / (ROUND * ACROSS);
  }
}

/** mm along a path. */
const STEP = 1;

const ALONG = 8;
const ROUND = 12;
const ACROSS = 3;

const polygonExcess = (sides: number): number => (Math.tan(Math.PI / sides) * sides) / Math.PI;

const stretches = (s: Sleeve): readonly (readonly [number, number, Half, Half])[] => [
  [s.root, s.coneFoot, s.rootHalf, s.cone],
  [s.coneFoot, s.coneTop, s.cone, s.outer],
  [s.coneTop, s.mouth, s.outer, s.outer],
];

/** The grid of a section and the half sizes that stretch it. */
const gridAcross = (half: Half): { readonly grid: Float64Array; readonly sizeA: number; readonly sizeB: number } =>
  typeof half === 'number'
    ? { grid: ROUND_GRID, sizeA: half, sizeB: half }
    : { grid: RECTANGLE_GRID, sizeA: half[0], sizeB: half[1] };

/** p = centre + a y + b z of a sleeve's section. */
function pointAcross(
  p: [number, number, number],
  centre: Vec3,
  { socket: { y, z } }: Sleeve,
  a: number,
  b: number,
): void {
  p[0] = centre[0] + y[0] * a + z[0] * b;
  p[1] = centre[1] + y[1] * a + z[1] * b;
  p[2] = centre[2] + y[2] * a + z[2] * b;
}

/** Centres of cells of equal area, two numbers each: of the unit circle, and of the square from -1 to 1. */
const ROUND_GRID = gridOf((k, m) => {
  const r = Math.sqrt((k + 0.5) / ACROSS);
  const angle = (2 * Math.PI * (m + 0.5)) / ROUND;
  return [r * Math.cos(angle), r * Math.sin(angle)];
});
const RECTANGLE_GRID = gridOf((k, m) => [((k + 0.5) / ACROSS) * 2 - 1, ((m + 0.5) / ROUND) * 2 - 1]);

function gridOf(at: (k: number, m: number) => readonly [number, number]): Float64Array {
  const grid = new Float64Array(2 * ACROSS * ROUND);
  for (let k = 0; k < ACROSS; k++) for (let m = 0; m < ROUND; m++) grid.set(at(k, m), 2 * (k * ROUND + m));
  return grid;
}
