import type { Finding } from '../../model/finding.js';
import { sayFinding } from '../../model/findings/index.js';
import type { Flow } from '../kit/flow.js';
import { sayInUnits } from '../kit/say-in-units.js';
import type { PackRecords } from '../records.js';

const WORDS = { stop: 'STOP', warn: 'Warning', note: 'Note' } as const;

/** The verdict in one sentence, then every finding, worst first, then the waived stops with who answers for them. */
export function findingsSection(flow: Flow, records: PackRecords): void {
  const { findings, waived, status, hold } = records;
  const say = (words: string): string => sayInUnits(words, records.job.output);
  const count = (level: Finding['level']): number => findings.filter((f) => f.level === level).length;
  const verdict =
    status === 'clear'
      ? 'Clear: nothing was found that must be put right.'
      : hold.length > 0
        ? `On hold: ${plural(count('stop'), 'stop')}, ${plural(count('warn'), 'warning')}. Make nothing from this pack until the stops are put right or somebody answers for them.`
        : `Flagged: ${plural(count('warn'), 'warning')}. Read before anything is made.`;
  flow.paragraph(verdict, { bold: true, size: 12 });
  if (findings.length > 0)
    flow.table(
      [
        { head: '', bold: true, value: (r: Run) => WORDS[r.first.level] },
        { head: 'What was found, and how to mend it', wraps: true, value: (run: Run) => say(sayRun(run)) },
      ],
      runsOf(findings),
    );
  if (waived.length > 0) {
    flow.heading('Waived stops');
    flow.table(
      [
        { head: 'Answers for it', bold: true, value: (f: Finding) => String(f.about?.['by'] ?? '') },
        {
          head: 'Stop and reason',
          wraps: true,
          value: (f) => `${say(sayFinding(f))}. Reason: ${f.about?.['reason'] ?? ''}`,
        },
      ],
      waived,
    );
  }
}

/** Findings of one code and level: the worst in words, the others by mark and value. */
interface Run {
  readonly first: Finding;
  readonly others: readonly Finding[];
}

/** Fewer alike findings than this are each said in full. */
const ALIKE = 4;

function runsOf(findings: readonly Finding[]): Run[] {
  const byCode = new Map<string, Finding[]>();
  for (const f of findings) {
    const key = `${f.level} ${f.code}`;
    byCode.set(key, [...(byCode.get(key) ?? []), f]);
  }
  return [...byCode.values()].flatMap((alike): Run[] => {
    if (alike.length < ALIKE) return alike.map((first) => ({ first, others: [] }));
    // A value counts by how far it is on the wrong side of its limit, whichever side that is.
    const excess = (f: Finding): number => (f.value === null || f.limit === null ? 0 : Math.abs(f.value - f.limit));
    const [first, ...others] = [...alike].sort((a, b) => excess(b) - excess(a));
    return [{ first: first!, others }];
  });
}

function sayRun({ first, others }: Run): string {
  if (others.length === 0) return sayFinding(first);
  const unit = first.unit === '' ? '' : ` ${first.unit}`;
  if (first.subject === 'truss') {
    const values = others.filter((f) => f.value !== null).map((f) => `${Number(f.value!.toPrecision(3))}${unit}`);
    return `${sayFinding(first)}\nThe same ${others.length} times more${values.length > 0 ? `, with ${values.join(', ')}` : ''}`;
  }
  const said = others.map((f) =>
    f.value === null ? f.subject : `${f.subject} (${Number(f.value.toPrecision(3))}${unit})`,
  );
  return `${sayFinding(first)}\nThe same of ${others.length} more: ${said.join(', ')}`;
}

const plural = (n: number, word: string): string => `${n === 0 ? 'no' : n} ${word}${n === 1 ? '' : 's'}`;
