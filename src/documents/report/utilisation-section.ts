import type { Utilisation } from '../../model/solution.js';
import type { Flow } from '../kit/flow.js';
import { sayInUnits } from '../kit/say-in-units.js';
import { fixed, type Units } from '../kit/units.js';
import { byMark } from '../member-rows.js';
import type { PackRecords } from '../records.js';

/** Every strut, socket and panel by utilisation, worst first: one row a part, the governing combination and rule. */
export function utilisationSection(flow: Flow, records: PackRecords, units: Units): void {
  const worst = worstOfEach(records.utilisations);
  if (worst.length === 0) return;
  flow.heading('Utilisation, worst first', 40);
  flow.paragraph('1 is just strong enough; above it the part is over-stressed.');
  flow.table(
    [
      { head: 'Part', bold: true, value: nameOf },
      { head: 'Utilisation', align: 'right', bold: true, value: (u: Utilisation) => fixed(u.utilisation, 2) },
      { head: '', bold: true, value: (u) => (u.utilisation > 1 ? 'over' : '') },
      {
        head: `Force\n${units.forceUnit}`,
        align: 'right',
        value: (u) => (u.kind === 'panel' ? '' : units.force(u.force)),
      },
      { head: '', value: (u) => (u.kind === 'panel' ? '' : units.sense(u.force)) },
      { head: 'Combination', value: (u) => u.combination },
      { head: 'Rule', wraps: true, value: (u) => sayInUnits(u.rule, records.job.output) },
    ],
    worst,
  );
}

/** The worst verdict on each part, worst first; equals by mark. */
export function worstOfEach(utilisations: readonly Utilisation[]): Utilisation[] {
  const worst = new Map<string, Utilisation>();
  for (const u of utilisations) {
    const key = `${u.kind} ${u.mark} ${u.at ?? ''}`;
    if (u.utilisation > (worst.get(key)?.utilisation ?? Number.NEGATIVE_INFINITY)) worst.set(key, u);
  }
  return [...worst.values()].sort((a, b) => b.utilisation - a.utilisation || byMark(nameOf(a), nameOf(b)));
}

const nameOf = (u: Utilisation): string => (u.kind === 'socket' ? `${u.mark} in ${u.at}` : u.mark);
