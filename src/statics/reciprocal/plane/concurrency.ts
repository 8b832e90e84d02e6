import { addScaled, type Vec3 } from '../../../maths/vec3.js';
import type { Topology } from '../../../model/topology.js';
import type { PlaneFigure } from './plane-figure.js';
import type { Regions } from './regions.js';

/** The test on three struts that alone join two parts of a plane truss. */
export interface Concurrency {
  /** Marks of the three struts; the third is the one whose line is measured. */
  readonly struts: readonly [string, string, string];
  /** How far the line of the third passes from the point where the other two meet, mm; 0 for three parallels. */
  readonly miss: number;
  readonly limit: number;
  /** Where the other two meet, mm, in the truss's axes; null where they are parallel. */
  readonly point: Vec3 | null;
}

/** Lines whose directions differ by less than this sine are parallel. */
const PARALLEL = 1e-9;

/**
 * Three struts that alone join two rings must meet in one point or be parallel, for each ring is held in balance by those three
 * forces. Found as triangles of regions, each two of which share one of the struts; three struts of one node are no such triple, and both
 * parts must hold a closed ring of struts. For four struts or more concurrency is neither needed nor enough.
 * `share` of the smaller part's extent is the miss that is let pass.
 */
export function concurrencyTests(
  topology: Topology,
  figure: PlaneFigure,
  regions: Regions,
  share: number,
): Concurrency[] {
  const { edges, left } = regions;
  const beside = new Map<number, Map<number, number[]>>();
  const note = (r: number, s: number, m: number): void => {
    const row = beside.get(r) ?? new Map<number, number[]>();
    row.set(s, [...(row.get(s) ?? []), m]);
    beside.set(r, row);
  };
  const struts = edges.count / 2;
  for (let m = 0; m < struts; m++) {
    const [r, s] = [left[2 * m], left[2 * m + 1]];
    if (r === s) continue;
    note(r, s, m);
    note(s, r, m);
  }
  const found: Concurrency[] = [];
  for (let a = 0; a < struts; a++) {
    const [r, s] = [left[2 * a], left[2 * a + 1]];
    if (r === s) continue;
    const [few, many] = beside.get(r)!.size < beside.get(s)!.size ? [r, s] : [s, r];
    for (const [t, between] of beside.get(few)!) {
      if (t === many || !beside.get(many)!.has(t)) continue;
      for (const b of between) {
        if (b <= a) continue;
        for (const c of beside.get(many)!.get(t)!) {
          if (c <= a) continue;
          const sides = partsOf(topology, regions, [a, b, c]);
          if (sides)
            found.push(
              measure(
                topology,
                figure,
                regions,
                [a, b, c].sort((x, y) => x - y),
                sides,
                share,
              ),
            );
        }
      }
    }
  }
  return found;
}

/** Nodes at one end of the three struts and at the other; null unless both parts hold a ring. */
function partsOf(topology: Topology, regions: Regions, cut: readonly number[]): readonly [number[], number[]] | null {
  const { edges } = regions;
  const gone = new Set(cut);
  const part = (first: number): { nodes: Set<number>; struts: number } => {
    const nodes = new Set([first]);
    const queue = [first];
    let ends = 0;
    for (let i = queue.pop(); i !== undefined; i = queue.pop()) {
      for (const bar of topology.barsAt[i]) {
        if (gone.has(bar.memberIndex)) continue;
        ends++;
        const far = topology.nodeIndex.get(bar.far.mark)!;
        if (nodes.has(far)) continue;
        nodes.add(far);
        queue.push(far);
      }
    }
    return { nodes, struts: ends / 2 };
  };
  const [one, two] = [part(edges.start[2 * cut[0]]), part(edges.end[2 * cut[0]])];
  if (one.nodes.has(edges.end[2 * cut[0]])) return null;
  if (one.struts < one.nodes.size || two.struts < two.nodes.size) return null;
  const at = (side: Set<number>): number[] =>
    cut.map((m) => (side.has(edges.start[2 * m]) ? edges.start[2 * m] : edges.end[2 * m]));
  return [at(one.nodes), at(two.nodes)];
}

function measure(
  topology: Topology,
  figure: PlaneFigure,
  regions: Regions,
  cut: readonly number[],
  sides: readonly [number[], number[]],
  share: number,
): Concurrency {
  const { edges } = regions;
  const line = (m: number): { px: number; py: number; dx: number; dy: number } => {
    const [i, j] = [2 * edges.start[2 * m], 2 * edges.end[2 * m]];
    const [dx, dy] = [figure.at[j] - figure.at[i], figure.at[j + 1] - figure.at[i + 1]];
    const l = Math.hypot(dx, dy);
    return { px: figure.at[i], py: figure.at[i + 1], dx: dx / l, dy: dy / l };
  };
  const lines = cut.map(line);
  // The two that cross most squarely give the point most sharply.
  let [best, sine] = [[0, 1, 2], -1];
  for (const [i, j, k] of [
    [0, 1, 2],
    [0, 2, 1],
    [1, 2, 0],
  ]) {
    const s = Math.abs(lines[i].dx * lines[j].dy - lines[i].dy * lines[j].dx);
    if (s > sine + PARALLEL) [best, sine] = [[i, j, k], s];
  }
  const [i, j, k] = best;
  const marks = [i, j, k].map((n) => topology.truss.members[cut[n]].mark) as [string, string, string];
  const limit = share * Math.min(...sides.map((side) => spreadOf(figure, side)));
  if (sine <= PARALLEL) return { struts: marks, miss: 0, limit, point: null };
  const [p, q, r] = [lines[i], lines[j], lines[k]];
  const s = ((q.px - p.px) * q.dy - (q.py - p.py) * q.dx) / (p.dx * q.dy - p.dy * q.dx);
  const [x, y] = [p.px + s * p.dx, p.py + s * p.dy];
  const miss = Math.abs((x - r.px) * r.dy - (y - r.py) * r.dx);
  return {
    struts: marks,
    miss,
    limit,
    point: addScaled(addScaled(figure.origin, figure.x, x), figure.y, y),
  };
}

/** Largest distance between two of the nodes, mm. */
function spreadOf(figure: PlaneFigure, nodes: readonly number[]): number {
  let most = 0;
  for (const a of nodes)
    for (const b of nodes)
      most = Math.max(
        most,
        Math.hypot(figure.at[2 * a] - figure.at[2 * b], figure.at[2 * a + 1] - figure.at[2 * b + 1]),
      );
  return most;
}
