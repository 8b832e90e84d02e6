import { unionOf } from '../../maths/polygon/boolean.js';
import { type Region, regionOf } from '../../maths/polygon/depth.js';
import { convexNoFit } from '../../maths/polygon/minkowski.js';
import type { Budget } from './budget.js';
import type { Pose } from './pose.js';

/** No-fit regions made so far, up to a cap on their edges: 300 panels in four turns would make 215,000. */
export interface NoFitStore {
  /** Where the origin of `b` may not be, relative to that of `a`; made on first asking. */
  region(a: Pose, b: Pose): Region;
}

/** What making a region costs in evaluations of one, measured: about 2 µs, or 50 µs for each pair of convex parts. */
const CONVEX_COST = 10;
const UNION_COST = 200;
/** Numbers held at most: 16 million doubles are 128 MB. */
const MOST_NUMBERS = 16e6;

export function noFitStore(budget: Budget): NoFitStore {
  let table: ((Region | undefined)[] | undefined)[] = [];
  let numbers = 0;
  let most = 0;
  return {
    region(a, b) {
      // What was made in passing holds its own regions; of two such the later.
      const holder = a.passing && (!b.passing || a.id > b.id) ? a : b.passing ? b : null;
      if (holder) {
        const key = holder === a ? 2 * b.id : 2 * a.id + 1;
        const known = holder.passing!.get(key);
        if (known) return known;
        const region = noFitRegion(a, b);
        budget.spent += costOf(a, b);
        holder.passing!.set(key, region);
        return region;
      }
      let row = table[a.id];
      const found = row?.[b.id];
      if (found) return found;
      const made = noFitRegion(a, b);
      budget.spent += costOf(a, b);
      numbers += made.edges.length + 16;
      if (numbers > MOST_NUMBERS) {
        table = [];
        numbers = made.edges.length;
        row = undefined;
      }
      if (a.id > most || b.id > most) most = Math.max(a.id, b.id) + 64;
      if (!row) {
        // As long as it may get: an array that grows by leaps becomes a dictionary, ten times as slow.
        row = new Array<Region | undefined>(most + 1);
        table[a.id] = row;
      }
      row[b.id] = made;
      return made;
    },
  };
}

function costOf(a: Pose, b: Pose): number {
  const sums = a.parts.length * b.parts.length;
  return sums === 1 ? CONVEX_COST : UNION_COST * sums;
}

/** Union over the convex parts of a + (-b) (Minkowski; the way of Agarwal, Flato and Halperin 2002). */
function noFitRegion(a: Pose, b: Pose): Region {
  if (a.parts.length === 1 && b.parts.length === 1) return regionOf([convexNoFit(a.parts[0]!, b.parts[0]!)], true);
  const sums = a.parts.flatMap((p) => b.parts.map((q) => convexNoFit(p, q)));
  return regionOf(unionOf(sums), false);
}
