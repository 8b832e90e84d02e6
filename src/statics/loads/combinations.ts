import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { CaseKind, Duration, LoadCase } from './load-case.js';

/** A sum of cases with their factors. */
export interface Combination {
  readonly name: string;
  /** By the case's index. */
  readonly factors: readonly (readonly [caseIndex: number, factor: number])[];
  /** Shortest duration class among its cases (EN 1995-1-1 3.1.3 (2)). */
  readonly duration: Duration;
  /** Permanent loads help here: what uplift and overturning are judged by. */
  readonly favourable: boolean;
}

const ORDER: readonly Duration[] = ['permanent', 'long', 'medium', 'short', 'instantaneous'];
const PERMANENT: readonly CaseKind[] = ['self-weight', 'permanent', 'misfit'];

/** psi0 of EN 1990 table A1.1 (from memory): imposed by category, snow below 1000 m, wind, temperature. */
const PSI0_IMPOSED: Readonly<Record<Job['loads']['category'], number>> = { A: 0.7, B: 0.7, C: 0.7, D: 0.7, H: 0 };
const psi0 = (kind: CaseKind, job: Job): number =>
  kind === 'imposed' ? PSI0_IMPOSED[job.loads.category] : kind === 'snow' ? 0.5 : 0.6;

/**
 * Combinations of the job's own writing, with the uplift combination where they leave it out, or by EN 1990 expression (6.10): gammaG G, gammaG G + gammaQ Q1 + sum gammaQ psi0 Qi
 * for each leading action, and gammaG,inf G + gammaQ Q1 for each (always so with wind). Cases of one variable kind are
 * alternatives to each other, but for imposed loads, which act alone and all together.
 */
export function combinationsOf(
  cases: readonly LoadCase[],
  job: Job,
): { readonly combinations: readonly Combination[]; readonly findings: readonly Finding[] } {
  return job.loads.combinations ? written(cases, job) : { combinations: generated(cases, job), findings: [] };
}

function written(cases: readonly LoadCase[], job: Job): ReturnType<typeof combinationsOf> {
  const findings: Finding[] = [];
  const index = new Map(cases.map((c, i) => [c.name, i]));
  const combinations: Combination[] = [];
  for (const { name, factors } of job.loads.combinations!) {
    const known: [number, number][] = [];
    for (const [caseName, factor] of Object.entries(factors)) {
      const i = index.get(caseName);
      if (i === undefined)
        findings.push(finding('combination-unknown-case', 'truss', { about: { combination: name, case: caseName } }));
      else if (factor !== 0) known.push([i, factor]);
    }
    const favourable = known.some(([i, f]) => PERMANENT.includes(cases[i]!.kind) && f <= 1);
    if (known.length > 0) combinations.push({ name, factors: known, duration: shortest(known, cases), favourable });
  }
  return { combinations: [...combinations, ...missingUplift(combinations, cases, job)], findings };
}

/** gammaG,inf G + gammaQ W for each wind case that no written combination lets lift: light things are lost by it, so it is never left out. */
function missingUplift(given: readonly Combination[], cases: readonly LoadCase[], job: Job): Combination[] {
  const { gammaGfavourable, gammaQ } = job.loads;
  const permanent = cases.map((_, i) => i).filter((i) => PERMANENT.includes(cases[i]!.kind));
  const lifts = (c: Combination, wind: number): boolean =>
    c.factors.some(([i, f]) => i === wind && f >= gammaQ) &&
    c.factors.every(([i, f]) => !permanent.includes(i) || f <= gammaGfavourable);
  return cases.flatMap((c, wind) => {
    if (c.kind !== 'wind' || given.some((g) => lifts(g, wind))) return [];
    const factors = [...permanent.map((i) => [i, gammaGfavourable] as const), [wind, gammaQ] as const];
    const name = nameOf(factors, cases, permanent.length > 1);
    return [{ name, factors, duration: shortest(factors, cases), favourable: true }];
  });
}

function generated(cases: readonly LoadCase[], job: Job): Combination[] {
  const { gammaG, gammaGfavourable, gammaQ } = job.loads;
  const permanent = cases.map((_, i) => i).filter((i) => PERMANENT.includes(cases[i]!.kind));
  // What may act beside a leading action: per kind nothing, or one of the alternatives.
  const kinds = [...new Set(cases.filter((c) => !PERMANENT.includes(c.kind)).map((c) => c.kind))];
  const choices = new Map(
    kinds.map((kind) => {
      const own = cases.map((_, i) => i).filter((i) => cases[i]!.kind === kind);
      const alone = own.map((i) => [i]);
      return [kind, kind === 'imposed' && own.length > 1 ? [...alone, own] : alone] as const;
    }),
  );
  const out: Combination[] = [];
  const put = (g: number, terms: readonly (readonly [number, number])[], favourable: boolean): void => {
    const factors = [...permanent.map((i) => [i, g] as const), ...terms].filter(([, f]) => f !== 0);
    if (factors.length > 0)
      out.push({
        name: nameOf(factors, cases, permanent.length > 1),
        factors,
        duration: shortest(factors, cases),
        favourable,
      });
  };
  if (permanent.length > 0) put(gammaG, [], false);
  for (const kind of kinds)
    for (const leading of choices.get(kind)!) {
      const lead = leading.map((i) => [i, gammaQ] as const);
      for (const rest of besides(
        kinds.filter((k) => k !== kind),
        choices,
      ))
        put(gammaG, [...lead, ...rest.map((i) => [i, gammaQ * psi0(cases[i]!.kind, job)] as const)], false);
      if (permanent.length > 0) put(gammaGfavourable, lead, true);
    }
  return out;
}

/** Every way of adding nothing or one alternative of each kind. */
function besides(
  kinds: readonly CaseKind[],
  choices: ReadonlyMap<CaseKind, readonly (readonly number[])[]>,
): number[][] {
  return kinds.reduce<number[][]>(
    (sets, kind) => sets.flatMap((set) => [set, ...choices.get(kind)!.map((choice) => [...set, ...choice])]),
    [[]],
  );
}

function shortest(factors: readonly (readonly [number, number])[], cases: readonly LoadCase[]): Duration {
  let at = 0;
  for (const [i] of factors) at = Math.max(at, ORDER.indexOf(cases[i]!.duration));
  return ORDER[at]!;
}

/** "1.35 G + 1.5 wind from the west + 0.75 snow"; several permanent cases of one factor are G together. */
function nameOf(factors: readonly (readonly [number, number])[], cases: readonly LoadCase[], several: boolean): string {
  const terms: string[] = [];
  let permanentNamed = false;
  for (const [i, f] of factors) {
    const isPermanent = PERMANENT.includes(cases[i]!.kind);
    if (isPermanent && permanentNamed) continue;
    permanentNamed ||= isPermanent;
    terms.push(
      `${Number(f.toFixed(3))} ${isPermanent && (several || cases[i]!.kind === 'self-weight') ? 'G' : cases[i]!.name}`,
    );
  }
  return terms.join(' + ');
}
