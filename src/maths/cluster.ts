import { closePairs } from './close-pairs.js';
import { distance, mean, type Vec3 } from './vec3.js';

export interface Clusters {
  /** Centre of each cluster, in the order of its first point; the point itself where all of a cluster are equal. */
  readonly centres: readonly Vec3[];
  /** Cluster of each point. */
  readonly of: Int32Array;
  /** Largest distance of a point from its cluster's centre. */
  readonly farthest: number;
}

/**
 * Joins points no farther apart than `within`, and whatever they join to (single linkage, by union-find: Tarjan, J. ACM
 * 22(2), 1975). The centre is the mean of the different places of a cluster, so that a place met more often weighs no more.
 */
export function clusterPoints(points: readonly Vec3[], within: number): Clusters {
  // Equal points are one place before any distance is taken: most ends of a drawing's lines are.
  const places: Vec3[] = [];
  const placeOf = new Map<string, number>();
  const place = points.map((p) => {
    // + 0 makes minus nought nought.
    const key = `${p[0] + 0} ${p[1] + 0} ${p[2] + 0}`;
    const known = placeOf.get(key);
    if (known !== undefined) return known;
    placeOf.set(key, places.length);
    places.push(p);
    return places.length - 1;
  });
  const parent = places.map((_, i) => i);
  const root = (i: number): number => {
    let r = i;
    while (parent[r] !== r) r = parent[r]!;
    for (let k = i; parent[k] !== r; ) [k, parent[k]] = [parent[k]!, r];
    return r;
  };
  for (const [i, j] of within > 0 ? closePairs(places, within) : []) {
    const [a, b] = [root(i), root(j)];
    parent[Math.max(a, b)] = Math.min(a, b);
  }
  const members = new Map<number, number[]>();
  places.forEach((_, i) => {
    const list = members.get(root(i));
    if (list) list.push(i);
    else members.set(root(i), [i]);
  });
  const clusterOf = new Int32Array(places.length);
  const centres: Vec3[] = [];
  let farthest = 0;
  for (const list of members.values()) {
    const centre = list.length === 1 ? places[list[0]!]! : mean(list.map((i) => places[i]!));
    for (const i of list) {
      clusterOf[i] = centres.length;
      farthest = Math.max(farthest, distance(places[i]!, centre));
    }
    centres.push(centre);
  }
  return { centres, of: Int32Array.from(place, (i) => clusterOf[i]!), farthest };
}
