import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import type { MemberActions, SupportDemand } from '../../model/solution.js';
import type { Topology } from '../../model/topology.js';
import { CaseBuilder, type LoadCase } from '../loads/load-case.js';
import { type Model, respond } from './model.js';
import { nearnessToEuler } from './nearness-to-euler.js';
import { actionsOf, combine, type Response } from './response.js';
import { mostLifted, supportDemands } from './support-demands.js';

/** Nodes whose loads are solved for at once: bounds the memory. */
const CHUNK = 64;

export interface Climbed {
  /** By member index. */
  readonly actions: readonly (readonly MemberActions[])[];
  /** What lifts each support most, the permanent loads at their favourable factor; supports that no climber lifts are left out. */
  readonly supports: readonly SupportDemand[];
  /** The nodes where a climber presses struts nearest to Euler's load, worst first: buckling of the whole is sought under these. */
  readonly pressing: readonly PressingClimber[];
  readonly residual: number;
}

/** A climber beside the permanent loads. */
export interface PressingClimber {
  readonly name: string;
  /** The climber alone, without factor. */
  readonly loads: LoadCase;
  /** Both, with their factors. */
  readonly response: Response;
}

/** Climbers that are kept for buckling. */
const PRESSING = 4;

/**
 * Actions under a person at each node in turn beside the permanent loads: per member those of the largest and least axial
 * force and of the largest moment, with the node in the combination's name. A load of short duration (EN 1991-1-1 6.3.4, maintenance).
 */
export function climberActions(
  topology: Topology,
  job: Job,
  parts: Parts,
  model: Exclude<Model, { kind: 'mechanism' }>,
  permanent: Response | null,
  spans: readonly (readonly [number, number])[],
): Climbed {
  const { truss } = topology;
  const { gammaQ, gammaG, gammaGfavourable } = job.loads;
  const members = truss.members.length;
  const kept: MemberActions[][] = truss.members.map(() => []);
  let lifted: SupportDemand[] = [];
  const nearness = nearnessToEuler(topology, parts);
  let pressing: (PressingClimber & { readonly rank: number })[] = [];
  let residual = 0;
  const nodes = truss.nodes.map((_, i) => i).filter((i) => topology.barsAt[i]!.length > 0);
  for (let from = 0; from < nodes.length; from += CHUNK) {
    const chunk = nodes.slice(from, from + CHUNK);
    const cases: LoadCase[] = chunk.map((i) => {
      const builder = new CaseBuilder(truss.nodes.length, members);
      builder.addNode(i, [0, 0, -job.analysis.climber_N]);
      return builder.done(truss.nodes[i]!.mark, 'imposed', 'short');
    });
    const solved = respond(model, topology, parts, cases);
    residual = Math.max(residual, solved.residual);
    solved.responses.forEach((r, k) => {
      const both = permanent
        ? combine(
            [permanent, r],
            [
              [0, gammaG],
              [1, gammaQ],
            ],
          )
        : combine([r], [[0, gammaQ]]);
      const name = `${permanent ? `${gammaG} G + ` : ''}${gammaQ} climber at ${cases[k]!.name}`;
      for (let e = 0; e < members; e++) keepExtremes(kept[e]!, actionsOf(both, e, ...spans[e]!, name, 'short'));
      pressing.push({ name, loads: cases[k]!, response: both, rank: nearness(both) });
      const held = r.reactions.map((v, i) => gammaQ * v + gammaGfavourable * (permanent?.reactions[i] ?? 0));
      const light = `${permanent ? `${gammaGfavourable} G + ` : ''}${gammaQ} climber at ${cases[k]!.name}`;
      lifted = mostLifted([...lifted, ...supportDemands(topology, light, held)]);
    });
    pressing = pressing
      .filter((p) => p.rank > 0)
      .sort((a, b) => b.rank - a.rank)
      .slice(0, PRESSING);
  }
  return { actions: kept, supports: lifted, pressing, residual };
}

/** Keeps at most three: the largest axial force, the least, the largest moment. */
function keepExtremes(kept: MemberActions[], a: MemberActions): void {
  if (kept.length === 0) {
    kept.push(a, a, a);
    return;
  }
  const moment = (m: MemberActions): number => Math.hypot(m.momentY, m.momentZ);
  if (a.axial > kept[0]!.axial) kept[0] = a;
  if (a.axial < kept[1]!.axial) kept[1] = a;
  if (moment(a) > moment(kept[2]!)) kept[2] = a;
}
