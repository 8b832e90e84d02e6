import { sectionsOf } from '../detailing/sections.js';
import { materialNamed, sectionNamed } from '../model/catalogue/resolve.js';
import { SECTIONS } from '../model/catalogue/sections/index.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { Material } from '../model/material.js';
import type { Parts } from '../model/parts.js';
import { type Section, sectionProperties } from '../model/section.js';
import type { SizeChoice } from '../model/sizing.js';
import type { Utilisation } from '../model/solution.js';
import type { Truss } from '../model/truss.js';
import { allActions, type Loading } from '../strength/actions.js';
import { rulesOf } from '../strength/rules.js';
import { judgeStrut } from '../strength/strut.js';

/** What one round of detailing and solving yields for a truss whose members all name their section. */
export interface SizedRound {
  readonly parts: Parts;
  readonly loading: Loading;
  readonly utilisations: readonly Utilisation[];
}

export interface Sizing {
  readonly choices: readonly SizeChoice[];
  /** The truss with the chosen section on every member. */
  readonly truss: Truss;
  readonly rounds: number;
  /** kg of struts, before and after; null where a cut length is unknown. */
  readonly massBefore: number | null;
  readonly massAfter: number | null;
  readonly findings: readonly Finding[];
}

interface Candidate {
  readonly section: Section;
  readonly material: Material;
  /** kg/m */
  readonly weight: number;
}

/**
 * The lightest section of the job's sizes for each group of struts, or for a strut in no group, with which its struts and their
 * sockets pass.
 *
 * All start with the lightest. Each round details and solves the whole anew (weight and setbacks have changed), and what fails moves to
 * the lightest heavier section that would carry the actions just found, one step at least. Sections only grow, so the rounds end. Then
 * what would pass one step lighter under the last actions is tried there, and goes back for good where it fails.
 *
 * @param solve details, solves and judges a truss; called once a round
 */
export async function sizeSections(
  truss: Truss,
  job: Job,
  solve: (truss: Truss) => SizedRound | Promise<SizedRound>,
  tell: (round: number, heavier: number) => void = () => {},
): Promise<Sizing> {
  const candidates = candidatesOf(job);
  const before = sectionsOf(truss, job).sections;
  if (candidates.length === 0) return nothing(truss, job);
  const units = unitsOf(truss);
  const rungs = units.map(() => 0);
  const floors = units.map(() => 0);
  let rounds = 0;
  const first = await solve(truss);
  const round = async (): Promise<Round> => {
    const sized = withSections(truss, units, rungs, candidates);
    rounds++;
    const found = await solve(sized);
    return { sized, found, actions: allActions(sized, found.loading, job), worst: worstByStrut(found.utilisations) };
  };

  let state = await round();
  for (;;) {
    const failing = failures(units, state);
    let heavier = 0;
    failing.forEach((fails, u) => {
      if (!fails || rungs[u]! >= candidates.length - 1) return;
      rungs[u] = stronger(units[u]!, rungs[u]! + 1, candidates, state, job);
      heavier++;
    });
    tell(rounds, heavier);
    if (heavier > 0) {
      // Whatever this round grew from has failed: no lighter trial goes below it again.
      failing.forEach((fails, u) => {
        if (fails) floors[u] = Math.max(floors[u]!, rungs[u]!);
      });
      state = await round();
      continue;
    }
    const lighter = units.flatMap((unit, u) =>
      !failing[u] && rungs[u]! > floors[u]! && carries(unit, candidates[rungs[u]! - 1]!, state, job) ? [u] : [],
    );
    if (lighter.length === 0) break;
    for (const u of lighter) rungs[u] = rungs[u]! - 1;
    state = await round();
  }

  const { worst } = state;
  const stuck = failures(units, state);
  const choices = units.map((unit, u): SizeChoice => {
    const top = unit.members.map((i) => worst.get(truss.members[i]!.mark)).filter((w) => w !== undefined);
    const most = top.reduce<Utilisation | null>((m, w) => (m === null || w.utilisation > m.utilisation ? w : m), null);
    return {
      name: unit.name,
      struts: unit.members.map((i) => truss.members[i]!.mark),
      from: before[unit.members[0]!]?.name ?? null,
      to: candidates[rungs[u]!]!.section.name,
      utilisation: most?.utilisation ?? null,
      rule: most?.rule ?? '',
    };
  });
  const findings = choices
    .filter((_, u) => stuck[u])
    .map((c) =>
      finding('no-section-passes', c.struts[0]!, { value: c.utilisation, limit: 1, about: { section: c.to } }),
    );
  return {
    choices,
    truss: state.sized,
    rounds,
    massBefore: massOf(first.parts),
    massAfter: massOf(state.found.parts),
    findings: [...unknownSizes(job), ...findings],
  };
}

/** Sections to choose from, lightest first: the job's sizes, else the catalogue's of the same material and shape as the job's section. */
function candidatesOf(job: Job): readonly Candidate[] {
  const usual = sectionNamed(job, job.struts.section);
  const alike = (s: Section): boolean => s.material === usual?.material && s.shape.kind === usual.shape.kind;
  const sections =
    job.struts.sizes.length > 0
      ? job.struts.sizes.map((name) => sectionNamed(job, name)).filter((s) => s !== null)
      : [...SECTIONS.values()].filter(alike);
  return sections
    .flatMap((section) => {
      const material = materialNamed(job, section.material);
      return material === null
        ? []
        : [{ section, material, weight: (sectionProperties(section.shape).area * material.density) / 1e6 }];
    })
    .sort((a, b) => a.weight - b.weight || (a.section.name < b.section.name ? -1 : 1));
}

interface Unit {
  readonly name: string;
  readonly members: readonly number[];
}

/** Groups in the order of their first member, struts in no group each by itself. */
function unitsOf(truss: Truss): readonly Unit[] {
  const units: { name: string; members: number[] }[] = [];
  const groups = new Map<string, { name: string; members: number[] }>();
  truss.members.forEach((member, i) => {
    const known = member.group === null ? undefined : groups.get(member.group);
    if (known) {
      known.members.push(i);
      return;
    }
    const unit = { name: member.group ?? member.mark, members: [i] };
    if (member.group !== null) groups.set(member.group, unit);
    units.push(unit);
  });
  return units;
}

function withSections(
  truss: Truss,
  units: readonly Unit[],
  rungs: readonly number[],
  candidates: readonly Candidate[],
): Truss {
  const names = new Array<string>(truss.members.length);
  units.forEach((unit, u) => {
    for (const i of unit.members) names[i] = candidates[rungs[u]!]!.section.name;
  });
  return { ...truss, members: truss.members.map((m, i) => ({ ...m, section: names[i]! })) };
}

/** The worst utilisation of each strut and its sockets, by the strut's mark. */
function worstByStrut(utilisations: readonly Utilisation[]): ReadonlyMap<string, Utilisation> {
  const worst = new Map<string, Utilisation>();
  for (const u of utilisations)
    if (u.kind !== 'panel' && u.utilisation > (worst.get(u.mark)?.utilisation ?? -1)) worst.set(u.mark, u);
  return worst;
}

/** A round with what is asked of it again and again. */
interface Round {
  readonly sized: Truss;
  readonly found: SizedRound;
  readonly actions: ReturnType<typeof allActions>;
  readonly worst: ReadonlyMap<string, Utilisation>;
}

/** A unit fails where a strut or a socket of it does, or where a strut with actions was not judged. */
function failures(units: readonly Unit[], { found, actions, worst }: Round): readonly boolean[] {
  const judged = new Set(found.utilisations.filter((u) => u.kind === 'strut').map((u) => u.mark));
  return units.map((unit) =>
    unit.members.some((i) => {
      const { mark } = found.parts.struts[i]!;
      return (worst.get(mark)?.utilisation ?? 0) > 1 || (actions[i]!.length > 0 && !judged.has(mark));
    }),
  );
}

/** Whether every strut of a unit would pass with a section under the actions found with the present ones; struts alone, sockets need detailing. */
function carries(unit: Unit, candidate: Candidate, { found, actions }: Round, job: Job): boolean {
  const rules = rulesOf(job);
  return unit.members.every((i) => {
    if (actions[i]!.length === 0) return true;
    const { axisLength } = found.parts.struts[i]!;
    const said = judgeStrut(candidate.section.shape, candidate.material, axisLength, actions[i]!, job, rules);
    return said.kind === 'judged' && said.verdict.utilisation <= 1;
  });
}

/** The lightest rung from `least` on that would carry the actions just found; the heaviest where none would. */
function stronger(unit: Unit, least: number, candidates: readonly Candidate[], round: Round, job: Job): number {
  for (let rung = least; rung < candidates.length; rung++)
    if (carries(unit, candidates[rung]!, round, job)) return rung;
  return candidates.length - 1;
}

const unknownSizes = (job: Job): readonly Finding[] =>
  job.struts.sizes
    .filter((name) => sectionNamed(job, name) === null)
    .map((section) => finding('size-unknown', 'truss', { about: { section } }));

const massOf = (parts: Parts): number | null =>
  parts.struts.reduce<number | null>((sum, s) => (sum === null || s.mass === null ? null : sum + s.mass), 0);

function nothing(truss: Truss, job: Job): Sizing {
  const reason = job.struts.sizes.length > 0 ? 'none of struts.sizes is known' : `"${job.struts.section}" is not known`;
  return {
    choices: [],
    truss,
    rounds: 0,
    massBefore: null,
    massAfter: null,
    findings: [finding('sizes-missing', 'truss', { about: { reason } })],
  };
}
