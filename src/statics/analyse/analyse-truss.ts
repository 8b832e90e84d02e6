import type { FaceForm } from '../../detailing/faces.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Parts } from '../../model/parts.js';
import type { CaseResult, MemberActions, Solution } from '../../model/solution.js';
import type { Topology } from '../../model/topology.js';
import { GIVEN_CASE } from '../../model/truss.js';
import type { Equilibrium } from '../equilibrium.js';
import type { Segment } from '../frame/member.js';
import { loadCases, SELF_STRESS } from '../loads/cases.js';
import { combinationsOf } from '../loads/combinations.js';
import type { LoadCase } from '../loads/load-case.js';
import { climbed, missingLoads } from '../loads/required.js';
import { elasticForces } from '../pin-truss.js';
import { prestressTest, splitForces } from '../prestress.js';
import { climberActions, type PressingClimber } from './climber.js';
import { equilibriumOfCase } from './equilibrium-of-case.js';
import { strutStiffness } from './member-stiffness.js';
import { jointsHold, type Model, modelOf, respond } from './model.js';
import { overturningOf } from './overturning.js';
import { actionsOf, axialForces, combine, pinLoads, type Response } from './response.js';
import { stabilityOf } from './stability.js';
import { countsRecord, type States, statesOf } from './states.js';
import { supportDemands } from './support-demands.js';
import { overturningFindings, upliftFindings } from './supports.js';

/** A solve with a larger normalised residual is reported: well-posed ones stay below 1e-14. */
const INEXACT = 1e-10;
/** Self-stress and differences below this share of the largest force are round-off of the given forces. */
const NO_SELF_STRESS = 1e-3;

/** What statics needs beside the truss. */
export interface AnalysisInput {
  readonly topology: Topology;
  readonly job: Job;
  readonly parts: Parts;
  /** By face index. */
  readonly forms: readonly FaceForm[];
  /** Forces that the truss file or its reciprocal diagram claims, N by member index; null: none. */
  readonly given: Float64Array | null;
  /** false leaves the search for load factors out, for a first pass whose parts will still change; absent: as the job says. */
  readonly buckling?: boolean;
}

export interface Analysed {
  readonly solution: Solution;
  readonly findings: readonly Finding[];
  /** Balance of the first case that the truss file loads (else of the first case); null where nothing was solved. */
  readonly equilibrium: Equilibrium | null;
}

/**
 * All that statics finds out of a truss and its job: states and mechanisms, cases and combinations with forces, displacements
 * and reactions, actions of every member, buckling, supports. A truss without supports is counted and not loaded.
 */
export function analyseTruss(input: AnalysisInput): Analysed {
  const { topology, job, parts, given } = input;
  const { truss } = topology;
  const findings: Finding[] = [];
  const states = statesOf(topology);
  const { figure } = states;
  findings.push(...states.findings, ...missingLoads(job));
  const stop = (notChecked: readonly string[]) => ({
    solution: bare(states, given, notChecked),
    findings,
    equilibrium: null,
  });
  if (truss.supports.length === 0) {
    findings.push(finding('supports-missing', 'truss'));
    return stop(['loads', 'stability']);
  }
  const stiffness = truss.members.map((m, e) => strutStiffness(m, parts.struts[e]!));
  for (const [e, s] of stiffness.entries()) if (!s) findings.push(finding('stiffness-missing', truss.members[e]!.mark));
  if (!states.held || stiffness.some((s) => s === null)) return stop(['loads', 'stability']);
  const known = stiffness as readonly Segment[];

  const { cases, findings: caseFindings } = loadCases(topology, job, parts, input.forms);
  findings.push(...caseFindings, ...loadsOnFreeNodes(topology, cases));
  const pin = { ...figure, axialStiffness: Float64Array.from(known, (s) => s.axial) };
  const counts = countsRecord(
    states,
    cases.map((c) => pinLoads(c, topology, figure.ends).forces),
  );

  const device = cases.find((c) => c.name === SELF_STRESS);
  const prestress = device ? elasticForces(pin, pinLoads(device, topology, figure.ends)) : null;
  const held = prestress
    ? prestressTest(
        figure,
        prestress,
        states.counts.mechanismShapes.map((m) => m.shape),
      )
    : null;
  const model = modelOf(topology, job, parts, figure, known, held?.holds ? prestress : null);
  if (model.kind === 'mechanism' || (model.kind === 'pinned' && counts.mechanisms > 0 && !held?.holds)) {
    const node = model.kind === 'mechanism' ? truss.nodes[model.node]!.mark : 'it';
    findings.push(...mechanismStops(states, node));
    return { solution: { ...bare(states, given, ['loads', 'stability']), counts }, findings, equilibrium: null };
  }

  const { responses, residual } = respond(model, topology, parts, cases);
  const { combinations, findings: combinationFindings } = combinationsOf(cases, job);
  findings.push(...combinationFindings);
  const combined = combinations.map((c) => combine(responses, c.factors));
  const spans = truss.members.map((_, e) => spanOf(parts, topology, e, model));
  const actions: MemberActions[][] = truss.members.map((_, e) =>
    combined.map((r, c) => actionsOf(r, e, ...spans[e]!, combinations[c]!.name, combinations[c]!.duration)),
  );

  let worstResidual = residual;
  const supports = combined.flatMap((r, c) => supportDemands(topology, combinations[c]!.name, r.reactions));
  const climber_N = climbed(job) ? job.analysis.climber_N : 0;
  const overturning = overturningOf(topology, job, cases, combinations, climber_N);
  const permanent = cases.map((c, i) => [i, c] as const).filter(([, c]) => c.duration === 'permanent');
  let pressing: readonly PressingClimber[] = [];
  if (climbed(job)) {
    const dead =
      permanent.length > 0
        ? combine(
            responses,
            permanent.map(([i]) => [i, 1] as const),
          )
        : null;
    const climber = climberActions(topology, job, parts, model, dead, spans);
    for (const [e, own] of climber.actions.entries()) actions[e]!.push(...own);
    worstResidual = Math.max(worstResidual, climber.residual);
    supports.push(...climber.supports);
    pressing = climber.pressing;
  }
  if (given) findings.push(...besideGiven(topology, given, pin, cases, responses, actions, job));

  const stability =
    (input.buckling ?? job.analysis.buckling)
      ? stabilityOf(
          topology,
          job,
          parts,
          model,
          [...cases, ...pressing.map((p) => p.loads)],
          [
            ...combinations,
            ...pressing.map(({ name }, k) => ({
              name,
              factors: [
                ...permanent.map(([i]) => [i, job.loads.gammaG] as const),
                [cases.length + k, job.loads.gammaQ] as const,
              ],
              duration: 'short' as const,
              favourable: false,
            })),
          ],
          [...combined, ...pressing.map((p) => p.response)],
        )
      : null;
  if (stability) findings.push(...stability.findings);
  for (const [e, own] of (stability?.secondOrder?.actions ?? []).entries()) actions[e]!.push(...own);
  findings.push(...mechanismNotes(states, job, parts, stability?.lowest ?? null, held));
  findings.push(...upliftFindings(supports, job), ...overturningFindings(overturning, job));
  if (worstResidual > INEXACT)
    findings.push(finding('solve-inexact', 'truss', { value: worstResidual, limit: INEXACT }));

  const result = (name: string, kind: CaseResult['kind'], r: Response): CaseResult => ({
    name,
    kind,
    forces: axialForces(r),
    displacements: r.displacements,
    reactions: reactionsOf(topology, r),
  });
  const shown = Math.max(
    0,
    cases.findIndex((c) => truss.loads.some((l) => l.case === c.name)),
  );
  return {
    equilibrium: cases.length > 0 ? equilibriumOfCase(topology, cases[shown]!, responses[shown]!) : null,
    solution: {
      counts,
      cases: [...givenCase(given), ...responses.map((r, i) => result(cases[i]!.name, cases[i]!.kind, r))],
      combinations: combined.map((r, c) => result(combinations[c]!.name, 'combination', r)),
      actions,
      buckling: stability?.buckling ?? [],
      supports,
      overturning,
      solveResidual: worstResidual,
      checked: ['states', 'loads', ...(stability ? ['stability'] : [])],
      notChecked: stability ? [] : ['stability'],
    },
    findings,
  };
}

/** A solution that holds the counts alone. */
function bare(states: States, given: Float64Array | null, notChecked: readonly string[]): Solution {
  return {
    counts: countsRecord(states, []),
    cases: givenCase(given),
    combinations: [],
    actions: [],
    buckling: [],
    solveResidual: null,
    checked: ['states'],
    notChecked,
  };
}

const givenCase = (given: Float64Array | null): CaseResult[] =>
  given ? [{ name: GIVEN_CASE, kind: 'given', forces: given, displacements: null, reactions: [] }] : [];

/** The part of a member that is the strut itself: between the stops of its sockets; the whole where joints are pins. */
function spanOf(parts: Parts, topology: Topology, e: number, model: Model): readonly [number, number] {
  const length = topology.axisLength[e]!;
  if (model.kind === 'pinned') return [0, length];
  const [a, b] = parts.struts[e]!.ends.map((end) => end.setback ?? 0);
  return a! + b! < length ? [a!, length - b!] : [0, length];
}

function loadsOnFreeNodes(topology: Topology, cases: readonly LoadCase[]): Finding[] {
  const found: Finding[] = [];
  topology.truss.nodes.forEach((node, i) => {
    if (topology.barsAt[i]!.length > 0) return;
    for (const c of cases) {
      const size = Math.hypot(c.nodal[3 * i]!, c.nodal[3 * i + 1]!, c.nodal[3 * i + 2]!);
      // A hub without struts still weighs something and stands by itself.
      if (size > 0 && c.kind !== 'self-weight')
        found.push(finding('load-on-free-node', node.mark, { value: size, about: { case: c.name } }));
    }
  });
  return found;
}

function mechanismStops(states: States, node: string): Finding[] {
  const words = states.notes.map((n) => n.words);
  return (words.length > 0 ? words : [`${node} can move`]).map((w) =>
    finding('truss-mechanism', 'truss', { about: { words: w } }),
  );
}

/** Mechanisms of the pinned figure that hubs or an installed self-stress hold, with the figure that says so. */
function mechanismNotes(
  states: States,
  job: Job,
  parts: Parts,
  lowest: number | null,
  held: { readonly holds: boolean; readonly eigenvalues: readonly number[] } | null,
): Finding[] {
  const byHubs = jointsHold(job, parts);
  return states.notes.map(({ words }) =>
    byHubs
      ? finding('mechanism-held', 'truss', {
          value: lowest,
          about: { words, by: 'its hubs hold it; lowest load factor with design stiffness' },
        })
      : finding('mechanism-held', 'truss', {
          value: held?.eigenvalues[0] ?? null,
          about: { words, by: 'the installed self-stress holds it; least stiffness in N/mm' },
        }),
  );
}

/**
 * Given forces beside the analysis: the self-stress in them is added to every combination as a second set of actions, since it may
 * or may not exist in the built thing; a note says how far given and analysed forces are apart.
 */
function besideGiven(
  topology: Topology,
  given: Float64Array,
  pin: Parameters<typeof splitForces>[0],
  cases: readonly LoadCase[],
  responses: readonly Response[],
  actions: MemberActions[][],
  job: Job,
): Finding[] {
  const most = given.reduce((a, b) => Math.max(a, Math.abs(b)), 0);
  if (most === 0) return [];
  const { selfStress } = splitForces(pin, given);
  const stressed = selfStress.some((t) => Math.abs(t) > NO_SELF_STRESS * most);
  if (stressed && !job.analysis.selfStress)
    actions.forEach((own, e) => {
      const t = selfStress[e]!;
      if (Math.abs(t) <= NO_SELF_STRESS * most) return;
      own.push(...own.map((a) => ({ ...a, axial: a.axial + t, combination: `${a.combination} + self-stress` })));
    });
  const analysed = cases.findIndex((c) => c.name === GIVEN_CASE);
  if (analysed < 0) return [];
  const forces = axialForces(responses[analysed]!);
  let at = 0;
  forces.forEach((t, e) => {
    if (Math.abs(t - given[e]!) > Math.abs(forces[at]! - given[at]!)) at = e;
  });
  const value = Math.abs(forces[at]! - given[at]!);
  if (value <= NO_SELF_STRESS * most) return [];
  const why = stressed ? 'the given forces hold self-stress' : 'the joints carry bending';
  return [finding('forces-not-elastic', 'truss', { value, about: { strut: topology.truss.members[at]!.mark, why } })];
}

const reactionsOf = (topology: Topology, r: Response): CaseResult['reactions'] =>
  topology.truss.supports.map(({ node }) => {
    const i = 3 * topology.nodeIndex.get(node)!;
    return { node, force: [r.reactions[i]!, r.reactions[i + 1]!, r.reactions[i + 2]!] };
  });
