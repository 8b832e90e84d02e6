import { convexHull3, type Hull3 } from '../../maths/convex-hull3.js';
import { add, addScaled, cross, dot, length, normalise, perpendicular, scale, type Vec3 } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import { LEAST_WALL } from './printing.js';
import { largest, type Sleeve } from './sleeve.js';
import { insidePath } from './sleeve-inside.js';

/** A hub cut in two along a plane through its node and screwed together. Relative to the node, mm. */
export interface ClampParts {
  /** Unit normal of the parting plane. */
  readonly normal: Vec3;
  /** Where screws cross the plane. */
  readonly screws: readonly Vec3[];
  /** Half the length of a screw's boss. */
  readonly half: number;
  /** Arms with the bosses at their ends, convex. */
  readonly arms: readonly Hull3[];
}

/** M3 screws: clear hole, hole that the screw cuts its thread in, and the boss round it, diameters in mm; common practice, no source. */
export const SCREW = { clear: 3.4, thread: 2.5, boss: 8.5 } as const;
/** Left between the halves, mm, so that they close on the strut and not on each other. */
export const PARTING = 0.4;
/** Sine of the angle to the plane under which a strut lies in it. */
export const IN_PLANE = 0.035;
const ANGLES = 36;
/** Least angle between two screws, rad, and the most screws. */
const [APART, MOST] = [1.3, 4] as const;
const ARM_MIDDLE = 4;

export function clampParts(sleeves: readonly Sleeve[], job: Job): ClampParts {
  const normal = partingPlane(sleeves);
  const inPlane = sleeves.filter((s) => Math.abs(dot(s.socket.direction, normal)) < IN_PLANE);
  const half = Math.max(5, ...inPlane.map((s) => largest(s.outer) * 0.8));
  const screws = screwPlaces(sleeves, normal, half, LEAST_WALL[job.nodes['process']]);
  const arms = screws.flatMap((p) => convexHull3(armPoints(p, normal, half)) ?? []);
  return { normal, screws, half, arms };
}

/** The plane through the node that most struts lie in and that the others' sleeves cross least. */
function partingPlane(sleeves: readonly Sleeve[]): Vec3 {
  const candidates: Vec3[] = [];
  sleeves.forEach((a, i) => {
    candidates.push(perpendicular(a.socket.direction));
    for (const b of sleeves.slice(i + 1)) {
      const n = cross(a.socket.direction, b.socket.direction);
      if (length(n) > 0.1) candidates.push(normalise(n));
    }
  });
  let best: Vec3 = candidates[0] ?? [0, 0, 1];
  let most = Number.NEGATIVE_INFINITY;
  for (const n of candidates) {
    let score = 0;
    for (const s of sleeves) {
      const sine = Math.abs(dot(s.socket.direction, n));
      if (sine < IN_PLANE) score += 1;
      else {
        if (sine * s.stop < largest(s.outer)) score -= 0.2;
        if (sine * s.mouth < largest(s.outer)) score -= 1;
      }
    }
    if (score > most + 1e-9) [best, most] = [n, score];
  }
  return best;
}

/** The nearest places in the plane, well apart, where a screw misses every strut by the least wall. */
function screwPlaces(sleeves: readonly Sleeve[], normal: Vec3, half: number, leastWall: number): Vec3[] {
  const u = perpendicular(normal);
  const v = cross(normal, u);
  const reach = Math.max(...sleeves.map((s) => s.mouth));
  const margin = SCREW.clear / 2 + leastWall + 0.2;
  const found: { at: Vec3; angle: number; r: number }[] = [];
  for (let k = 0; k < ANGLES; k++) {
    const angle = (2 * Math.PI * k) / ANGLES;
    const d = add(scale(u, Math.cos(angle)), scale(v, Math.sin(angle)));
    for (let r = 3; r <= reach; r++) {
      const at = scale(d, r);
      let clear = true;
      for (let t = -half - 1; clear && t <= half + 1; t += 1)
        clear = !sleeves.some((s) => insidePath(s, addScaled(at, normal, t), margin));
      if (clear) {
        found.push({ at, angle, r });
        break;
      }
    }
  }
  found.sort((a, b) => a.r - b.r || a.angle - b.angle);
  const kept: typeof found = [];
  for (const f of found) {
    const off = (g: { angle: number }): number => {
      const d = Math.abs(f.angle - g.angle);
      return Math.min(d, 2 * Math.PI - d);
    };
    if (kept.length < MOST && kept.every((g) => off(g) >= APART)) kept.push(f);
  }
  return kept.map((f) => f.at);
}

/** Corners of an arm: the boss, and a stub at the node. */
export function armPoints(at: Vec3, normal: Vec3, half: number): Vec3[] {
  const u = perpendicular(normal);
  const v = cross(normal, u);
  const ring = (centre: Vec3, r: number, h: number): Vec3[] =>
    Array.from({ length: 24 }, (_, k) => {
      const a = (2 * Math.PI * (k + 0.5)) / 24;
      const p = addScaled(addScaled(centre, u, r * Math.cos(a)), v, r * Math.sin(a));
      return addScaled(p, normal, h);
    });
  return [-1, 1].flatMap((side) => [
    ...ring(at, SCREW.boss / 2, side * half),
    ...ring([0, 0, 0], ARM_MIDDLE, side * half * 0.9),
  ]);
}
