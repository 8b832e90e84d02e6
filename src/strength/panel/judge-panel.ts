import { coarsePolygon } from '../../maths/polygon/coarse.js';
import { kDef } from '../../model/catalogue/timber-factors.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { Material } from '../../model/material.js';
import type { PanelPart, Point2 } from '../../model/parts.js';
import type { Utilisation } from '../../model/solution.js';
import { governing, type Rules, type Verdict } from '../standard.js';
import { PANEL_LIMITS } from './limits.js';
import { combinedPressure, type PanelCombination, panelPressures, standingCases } from './load.js';
import { type Plate, type PlateResponse, plateOf } from './plate.js';
import { panelSupports, type Sense } from './supports.js';

/** Growth of a sheet's deflection under standing load: the modulus of acrylic and its like halves over years (from memory). */
const CREEP_OF_PLASTIC = 1;
/** Pressures below this are round-off, MPa: a thousandth of the weight of a sheet of paper. */
const NO_PRESSURE = 1e-9;

export interface PanelJudgement {
  readonly utilisation: Utilisation | null;
  readonly findings: readonly Finding[];
}

/** The worst pressure of one sense and where it comes from, MPa, positive. */
interface Worst {
  readonly sense: Sense;
  readonly q: number;
  readonly combination: string;
}

/**
 * A panel under its pressures, both ways: bending stress against fm over the factor, the standing part against the sustained stress,
 * deflection with creep against half the bite of what holds it, force on the worst fixing against what one holds.
 *
 * @param corners the face's nodes in the panel's frame, mm
 */
export function judgePanel(
  given: PanelPart,
  corners: readonly Point2[],
  combinations: readonly PanelCombination[],
  job: Job,
  rules: Rules,
): PanelJudgement {
  const { material } = given;
  if (material === null || given.outline.length < 3) return { utilisation: null, findings: [] };
  const part = { ...given, outline: coarsePolygon(given.outline, PANEL_LIMITS.coarse * Math.sqrt(given.area)) };
  const pressures = panelPressures(part, job);
  const standing = standingCases(job).reduce((sum, name) => sum + (pressures.get(name) ?? 0), 0);
  const findings: Finding[] = [];
  let worst: { verdict: Verdict; load: Worst } | null = null;
  let shape: Plate | null = null;
  for (const load of worstPressures(combinations, pressures)) {
    const supports = panelSupports(part, corners, job, load.sense);
    shape ??= plateOf(part.outline, material.poisson ?? PANEL_LIMITS.poisson);
    const plate = supports && shape?.bend(supports);
    if (!plate) {
      // On a table the missing hold is said already; there is no load to speak of.
      if (supports || job.panels.holdBy !== 'none' || grave(job)) findings.push(notCarried(part, load, job));
      continue;
    }
    const stands = Math.max(0, load.sense === 'pressure' ? standing : -standing);
    const verdicts = [
      ...stressChecks(part, material, plate, load.q, stands, rules),
      ...sagCheck(part, material, plate, load, stands, job, rules, findings),
      ...fixingCheck(part, plate, load, job, findings),
    ];
    if (verdicts.length === 0) continue;
    const verdict = governing(verdicts);
    if (worst === null || verdict.utilisation > worst.verdict.utilisation) worst = { verdict, load };
    const stress = verdicts.filter((v) => v.rule.startsWith('panel stress')).reduce<Verdict | null>(higher, null);
    if (stress !== null && stress.utilisation > 1)
      findings.push(
        finding('panel-over-stressed', part.mark, {
          value: stress.utilisation,
          limit: 1,
          about: { rule: stress.rule, combination: load.combination, thickness: part.thickness },
        }),
      );
  }
  if (worst === null) return { utilisation: null, findings };
  const { verdict, load } = worst;
  return {
    utilisation: {
      mark: part.mark,
      kind: 'panel',
      at: null,
      combination: load.combination,
      force: (load.sense === 'pressure' ? -1 : 1) * load.q * part.area,
      utilisation: verdict.utilisation,
      rule: verdict.rule,
    },
    findings,
  };
}

const higher = (a: Verdict | null, b: Verdict): Verdict => (a === null || b.utilisation > a.utilisation ? b : a);

/** The largest pressure inward and the largest outward; a sense that no combination has is left out. */
function worstPressures(
  combinations: readonly PanelCombination[],
  pressures: ReadonlyMap<string, number>,
): readonly Worst[] {
  const found: Worst[] = [];
  for (const [sense, sign] of [
    ['pressure', 1],
    ['suction', -1],
  ] as const) {
    let most: Worst | null = null;
    for (const c of combinations) {
      const q = sign * combinedPressure(c, pressures);
      if (q > NO_PRESSURE && (most === null || q > most.q)) most = { sense, q, combination: c.name };
    }
    if (most) found.push(most);
  }
  return found;
}

function stressChecks(
  part: PanelPart,
  material: Material,
  plate: PlateResponse,
  q: number,
  stands: number,
  rules: Rules,
): Verdict[] {
  // A sheet bent cold onto its face carries that stress besides.
  const bent = part.bendStress ?? 0;
  const stress = (pressure: number): number => (6 * plate.moment * pressure) / part.thickness ** 2 + bent;
  const checks: Verdict[] = [];
  const bending = material.strength['fm'] ?? material.strength['ft'];
  if (bending !== undefined)
    checks.push({ utilisation: (stress(q) * rules.factor) / bending, rule: `panel stress, factor ${rules.factor}` });
  const { sustained } = material.strength;
  if (sustained !== undefined)
    checks.push({
      utilisation: stress(stands) / sustained,
      rule: `panel stress that stands, at most ${sustained} MPa`,
    });
  return checks;
}

function sagCheck(
  part: PanelPart,
  material: Material,
  plate: PlateResponse,
  load: Worst,
  stands: number,
  job: Job,
  rules: Rules,
  findings: Finding[],
): Verdict[] {
  const { holdBy } = job.panels;
  if (holdBy !== 'channel' && holdBy !== 'clips') return [];
  const bite = part.hold?.bite ?? job.panels.bite_mm;
  if (bite <= 0) return [];
  const nu = material.poisson ?? PANEL_LIMITS.poisson;
  const bending = (material.modulus * part.thickness ** 3) / (12 * (1 - nu * nu));
  const creep = material.family === 'board' ? kDef('board', rules.serviceClass) : CREEP_OF_PLASTIC;
  const sag = ((load.q + creep * stands) * plate.deflection) / bending;
  const limit = PANEL_LIMITS.shareOfBite * bite;
  if (sag > limit)
    findings.push(
      finding('panel-sags', part.mark, { value: sag, limit, about: { combination: load.combination, holdBy } }),
    );
  return [{ utilisation: sag / limit, rule: 'panel deflection, at most half the bite' }];
}

function fixingCheck(part: PanelPart, plate: PlateResponse, load: Worst, job: Job, findings: Finding[]): Verdict[] {
  if (plate.forces.length === 0) return [];
  const most = load.q * Math.max(...plate.forces);
  const capacity = job.panels.fixingCapacity_N;
  const about = { holdBy: job.panels.holdBy, combination: load.combination };
  if (capacity === undefined) {
    if (grave(job)) findings.push(finding('fixing-untested', part.mark, { value: most, about }));
    return [];
  }
  if (most > capacity) findings.push(finding('fixing-over-loaded', part.mark, { value: most, limit: capacity, about }));
  return [{ utilisation: most / capacity, rule: 'force on one fixing of the panel' }];
}

/** Weather on it or people under it. */
const grave = (job: Job): boolean => job.use === 'outdoor' || job.use === 'overhead';

/** Where people are under it or weather is on it, a panel that nothing carries is a stop. */
const notCarried = (part: PanelPart, load: Worst, job: Job): Finding =>
  finding('panel-not-carried', part.mark, {
    value: load.q * part.area,
    limit: 0,
    level: grave(job) ? 'stop' : 'warn',
    about: { sense: load.sense, combination: load.combination, holdBy: job.panels.holdBy },
  });
