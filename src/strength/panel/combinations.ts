import type { Job } from '../../model/job/index.js';
import type { Truss } from '../../model/truss.js';
import { SELF_STRESS } from '../../statics/loads/cases.js';
import { combinationsOf } from '../../statics/loads/combinations.js';
import { type CaseKind, DURATION, type LoadCase } from '../../statics/loads/load-case.js';
import { SELF_WEIGHT } from '../../statics/loads/self-weight.js';
import type { PanelCombination } from './load.js';

/** A case by name and kind alone: factors and durations ask for no more. */
const named = (name: string, kind: CaseKind): LoadCase => ({
  name,
  kind,
  duration: DURATION[kind],
  nodal: new Float64Array(0),
  lines: new Map(),
  freeElongation: null,
});

/** The combinations that statics makes of the same job, with factors by case name: panels carry their pressures also where the truss itself is not analysed. */
export function panelCombinations(truss: Truss, job: Job): readonly PanelCombination[] {
  const ofJob = new Set(job.loads.cases.map((c) => c.name));
  const ofFile = [...new Set(truss.loads.map((l) => l.case))].filter((name) => !ofJob.has(name));
  const cases = [
    ...(job.analysis.selfWeight ? [named(SELF_WEIGHT, 'self-weight')] : []),
    ...ofFile.map((name) => named(name, 'permanent')),
    ...job.loads.cases.map((c) => named(c.name, c.kind)),
    ...(job.analysis.selfStress ? [named(SELF_STRESS, 'misfit')] : []),
  ];
  return combinationsOf(cases, job).combinations.map(({ name, duration, factors }) => ({
    name,
    duration,
    factors: new Map(factors.map(([i, f]) => [cases[i]!.name, f])),
  }));
}
