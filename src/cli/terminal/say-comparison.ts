import type { ComparedPart, Comparison, Difference } from '../../model/comparison.js';
import { PART_KINDS } from '../../model/part-kind.js';
import type { Paint } from './paint.js';

const GROUPS = [
  ['unchanged', 'unchanged'],
  ['relabelled', 'relabelled only'],
  ['changed', 'changed'],
  ['new', 'new'],
  ['withdrawn', 'withdrawn'],
] as const;
/** Differences that a line names; the rest are counted. */
const NAMED = 4;

/** What stands between two packs, counts first, then every part that is not unchanged, one a line. */
export function sayComparison(c: Comparison, paint: Paint): string {
  const kinds = PART_KINDS.filter((kind) => GROUPS.some(([group]) => c.totals[group]![kind] > 0));
  const width = Math.max(...GROUPS.map(([, words]) => words.length));
  const head = `${''.padEnd(width)} ${kinds.map((k) => `${k}s`.padStart(8)).join('')}`;
  const counts = GROUPS.map(
    ([group, words]) => `${words.padEnd(width)} ${kinds.map((k) => String(c.totals[group]![k]).padStart(8)).join('')}`,
  );
  const name = (p: ComparedPart): string => `${p.kind} ${p.mark}`;
  const lines = [
    ...c.changed.map((p) => `changed    ${name(p)}: ${sayDifferences(p.what)}`),
    ...c.relabelled.map((p) => `relabelled ${name(p)}${p.was === p.mark ? '' : `, was ${p.was}`}`),
    ...c.new.map((p) => `new        ${name(p)}`),
    ...c.withdrawn.map((p) => `withdrawn  ${name(p)}`),
  ];
  const issue = (i: Comparison['from']): string => `${i.title}, revision ${i.revision}`;
  return `${[paint('bold', `From ${issue(c.from)} to ${issue(c.to)}`), head, ...counts, ...(lines.length > 0 ? ['', ...lines] : [])].join('\n')}\n`;
}

function sayDifferences(what: readonly Difference[]): string {
  if (what.length === 0) return 'its material, process or marks';
  const told = what.slice(0, NAMED).map((d) => `${d.name} ${d.from ?? 'none'} to ${d.to ?? 'none'}`);
  return `${told.join('; ')}${what.length > NAMED ? `; and ${what.length - NAMED} more` : ''}`;
}
