import { sayFinding } from '../../model/findings/index.js';
import type { SizeChoice } from '../../model/sizing.js';
import type { Sizing } from '../../pipeline/size.js';

const MOST_MARKS = 6;

/** What sizing chose, a line a group or strut that changed, then the masses and what no section carries. */
export function saySizing(sizing: Sizing): string {
  const changed = sizing.choices.filter((c) => c.from !== c.to);
  const kept = sizing.choices.length - changed.length;
  const rows = changed.map((c) => [c.name, c.from ?? 'none', c.to, used(c), marks(c)]);
  const head = ['strut', 'was', 'is', 'utilisation', 'struts'];
  const widths = head.map((h, k) => Math.max(h.length, ...rows.map((r) => r[k]!.length)));
  const line = (cells: readonly string[]): string =>
    cells
      .map((c, k) => c.padEnd(widths[k]!))
      .join('  ')
      .trimEnd();
  return [
    ...(rows.length > 0 ? [line(head), ...rows.map(line), ''] : []),
    `${changed.length} changed, ${kept} kept, in ${sizing.rounds} ${sizing.rounds === 1 ? 'round' : 'rounds'}.`,
    ...(sizing.massBefore !== null && sizing.massAfter !== null
      ? [`Struts weigh ${sizing.massAfter.toFixed(2)} kg, before ${sizing.massBefore.toFixed(2)} kg.`]
      : []),
    ...sizing.findings.map(
      (f) => `${f.level === 'stop' ? 'STOP' : f.level === 'warn' ? 'warning' : 'note'} ${sayFinding(f)}`,
    ),
    '',
  ].join('\n');
}

const used = (c: SizeChoice): string => (c.utilisation === null ? 'not judged' : c.utilisation.toFixed(2));

/** The struts of a group; a lone strut has its mark in front already. */
const marks = (c: SizeChoice): string =>
  c.struts.length === 1 && c.struts[0] === c.name
    ? ''
    : `${c.struts.slice(0, MOST_MARKS).join(' ')}${c.struts.length > MOST_MARKS ? ` and ${c.struts.length - MOST_MARKS} more` : ''}`;
