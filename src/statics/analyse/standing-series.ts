import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import { type Topology, topologyOf } from '../../model/topology.js';
import { jointsHold } from './model.js';
import { pinnedSeries, rigidSeries, type SeriesModel } from './series-model.js';
import { type Sag, type Standing, standingDeflection } from './standing.js';
import { factoriseStanding } from './standing-factor.js';

/**
 * Answers the same as `standingDeflection`, for many states of one truss that is being built: freedoms, the members' matrices,
 * their places and the order of elimination are worked out once, for the whole truss; a state only adds up what stands.
 * The function returned takes the state; null where a stiffness is unknown.
 */
export function standingSeries(
  whole: Topology,
  job: Job,
  parts: Parts,
): (standing: Standing) => Sag | 'unstable' | null {
  const { truss } = whole;
  const topology = topologyOf({ ...truss, faces: [], cells: [], reciprocal: null, loads: [] });
  const bare: Parts = { ...parts, panels: [] };
  const frame = jointsHold(job, bare);
  let model: SeriesModel | null | undefined;
  const holding = new Set(
    parts.hubs.filter((h) => jointsHold(job, { ...bare, hubs: [h] })).map((h) => topology.nodeIndex.get(h.mark)!),
  );
  return (standing) => {
    // Where none of the joints that stand holds its strut's direction, what stands is pinned though the whole is not.
    if (frame && parts.hubs.length > 0 && !standing.nodes.some((n) => holding.has(n)))
      return standingDeflection(whole, job, parts, standing);
    if (standing.struts.length === 0) return null;
    model ??= frame ? rigidSeries(topology, job, bare) : pinnedSeries(topology, job, bare);
    return model && largestMove(model, standing);
  };
}

function largestMove(model: SeriesModel, standing: Standing): Sag | 'unstable' {
  const { freedoms, ends, weights, hubWeights } = model;
  const { perNode } = freedoms;
  const stands = new Uint8Array(ends.length / 2);
  const joined = new Uint8Array(freedoms.of.length / perNode);
  const right = new Float64Array(freedoms.count);
  const add = (freedom: number, v: number): void => {
    if (freedom >= 0) right[freedom] = right[freedom]! + v;
  };
  for (const e of standing.struts) {
    stands[e] = 1;
    for (let s = 0; s < 2; s++) {
      const node = ends[2 * e + s]!;
      joined[node] = 1;
      for (let k = 0; k < perNode; k++)
        add(freedoms.of[perNode * node + k]!, weights[2 * perNode * e + perNode * s + k]!);
    }
  }
  for (const n of standing.nodes) add(freedoms.of[perNode * n + 2]!, hubWeights[n]!);
  const active = new Uint8Array(freedoms.count);
  freedoms.of.forEach((f, k) => {
    if (f >= 0 && joined[Math.floor(k / perNode)]) active[f] = 1;
  });
  for (const n of standing.held)
    for (let k = 0; k < 3; k++) {
      const f = freedoms.of[perNode * n + k]!;
      if (f >= 0) active[f] = 0;
    }
  for (let f = 0; f < right.length; f++) if (!active[f]) right[f] = 0;
  const x = factoriseStanding(model, stands, active, right);
  if (!x) return 'unstable';
  let [most, node] = [0, standing.nodes[0]!];
  for (const n of standing.nodes) {
    let sum = 0;
    for (let k = 0; k < 3; k++) {
      const f = freedoms.of[perNode * n + k]!;
      if (f >= 0) sum += x[f]! ** 2;
    }
    if (sum > most) [most, node] = [sum, n];
  }
  return { most: Math.sqrt(most), node };
}
