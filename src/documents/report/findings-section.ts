import type { Finding } from '../../model/finding.js';
import { sayFinding } from '../../model/findings/index.js';
import type { Flow } from '../kit/flow.js';
import type { PackRecords } from '../records.js';

const WORDS = { stop: 'STOP', warn: 'Warning', note: 'Note' } as const;

/** The verdict in one sentence, then every finding, worst first, then the waived stops with who answers for them. */
export function findingsSection(flow: Flow, records: PackRecords): void {
  const { findings, waived, status, hold } = records;
  const count = (level: Finding['level']): number => findings.filter((f) => f.level === level).length;
  const verdict =
    status === 'clear'
      ? 'Clear: nothing was found that must be put right.'
      : hold.length > 0
        ? `On hold: ${plural(count('stop'), 'stop')}, ${plural(count('warn'), 'warning')}. Make nothing from this pack until the stops are put right or somebody answers for them.`
        : `Flagged: ${plural(count('warn'), 'warning')}. Read them before anything is made.`;
  flow.paragraph(verdict, { bold: true, size: 12 });
  if (findings.length > 0)
    flow.table(
      [
        { head: '', bold: true, value: (f: Finding) => WORDS[f.level] },
        { head: 'What was found, and how to mend it', wraps: true, value: sayFinding },
      ],
      findings,
    );
  if (waived.length > 0) {
    flow.heading('Waived stops');
    flow.table(
      [
        { head: 'Answers for it', bold: true, value: (f: Finding) => String(f.about?.['by'] ?? '') },
        {
          head: 'Stop and reason',
          wraps: true,
          value: (f) => `${sayFinding(f)}. Reason: ${f.about?.['reason'] ?? ''}`,
        },
      ],
      waived,
    );
  }
}

const plural = (n: number, word: string): string => `${n === 0 ? 'no' : n} ${word}${n === 1 ? '' : 's'}`;
