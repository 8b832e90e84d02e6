import type { Finding, FindingEntry, SubjectKind } from './finding.js';
import { FINDINGS, type FindingCode, finding, sayFinding } from './findings/index.js';
import type { Job } from './job/index.js';

type Waiver = Job['waivers'][number];

/** What the findings come to once the job's waivers are applied. */
export interface Settled {
  /** Worst first, then by subject and code; waived stops are not among them. */
  readonly findings: readonly Finding[];
  /** Stops that a waiver covers, each with the reason and the name that the waiver gives. */
  readonly waived: readonly Finding[];
  readonly status: 'clear' | 'flagged';
  /** One sentence a stop that no waiver covers; empty: the pack is not on hold. */
  readonly hold: readonly string[];
}

const LEVELS = ['stop', 'warn', 'note'] as const;

/** Checks that each use asks for; one that was not made flags the pack. */
const ASKED: Readonly<Record<Job['use'], readonly string[]>> = {
  table: ['equilibrium', 'flatness'],
  display: ['equilibrium', 'flatness', 'strength'],
  outdoor: ['equilibrium', 'flatness', 'strength', 'stability'],
  overhead: ['equilibrium', 'flatness', 'strength', 'stability'],
};

/** Applies the waivers: a waived stop leaves the list, an idle or voided waiver becomes a note. */
export function settleFindings(found: readonly Finding[], job: Job, notChecked: readonly string[]): Settled {
  const waived: Finding[] = [];
  const open: Finding[] = [];
  const used = new Set<Waiver>();
  for (const f of found) {
    const waiver =
      f.level === 'stop' ? job.waivers.find((w) => w.code === f.code && w.subject === f.subject) : undefined;
    if (waiver) used.add(waiver);
    if (waiver && covers(waiver, f)) waived.push({ ...f, about: { ...f.about, reason: waiver.reason, by: waiver.by } });
    else open.push(f);
    if (waiver && !covers(waiver, f)) open.push(voided(waiver, f));
  }
  for (const w of job.waivers)
    if (!used.has(w)) open.push(finding('waiver-idle', w.subject, { kind: 'truss', about: { code: w.code } }));
  for (const check of ASKED[job.use])
    if (notChecked.includes(check)) open.push(finding('check-missing', 'truss', { about: { check, use: job.use } }));
  const findings = inOrder(open);
  const stops = findings.filter((f) => f.level === 'stop');
  return {
    findings,
    waived: inOrder(waived),
    status: findings.some((f) => f.level !== 'note') ? 'flagged' : 'clear',
    hold: stops.map(sayFinding),
  };
}

/** A waiver covers a stop that may be waived and is no worse than its `upTo`; a stop with a number needs one. */
function covers(waiver: Waiver, f: Finding): boolean {
  const entry: FindingEntry = FINDINGS[f.code as FindingCode];
  if (!entry.waivable) return false;
  if (f.value === null) return true;
  if (waiver.upTo === undefined) return false;
  // A wall that is too thin gets worse downwards, a stress upwards.
  const worseIsMore = f.limit === null || f.value >= f.limit;
  return worseIsMore ? f.value <= waiver.upTo : f.value >= waiver.upTo;
}

function voided(waiver: Waiver, f: Finding): Finding {
  const entry: FindingEntry = FINDINGS[f.code as FindingCode];
  const why = !entry.waivable
    ? 'this cannot be waived'
    : waiver.upTo === undefined
      ? 'it states no "upTo"'
      : 'the value is worse than its "upTo"';
  return finding('waiver-void', f.subject, {
    kind: f.kind,
    value: f.value,
    limit: waiver.upTo ?? null,
    about: { code: f.code, why },
  });
}

const inOrder = (findings: readonly Finding[]): Finding[] =>
  findings
    .map((f, i) => ({ f, i }))
    .sort((a, b) => LEVELS.indexOf(a.f.level) - LEVELS.indexOf(b.f.level) || a.i - b.i)
    .map(({ f }) => f);

/** Whether a part's machine files are withheld: an unwaived stop names it as itself unsound. */
export function isWithheld(kind: SubjectKind, mark: string, settled: readonly Finding[]): boolean {
  return settled.some((f) => {
    const entry: FindingEntry = FINDINGS[f.code as FindingCode];
    return f.level === 'stop' && entry.withholds && f.kind === kind && f.subject === mark;
  });
}
