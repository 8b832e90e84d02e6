import type { SupportDemand } from '../../model/solution.js';
import type { Flow } from '../kit/flow.js';
import { fixed, type Units } from '../kit/units.js';
import { byMark } from '../member-rows.js';
import type { PackRecords } from '../records.js';

/** One support by the combinations that press it, lift it and push it sideways most. */
interface SupportRow {
  readonly node: string;
  readonly pressed: SupportDemand;
  readonly lifted: SupportDemand;
  readonly pushed: SupportDemand;
}

/** What each support must hold, and how near the whole is to tipping over. */
export function supportsSection(flow: Flow, { solution }: PackRecords, units: Units): void {
  const demands = solution?.supports ?? [];
  if (demands.length === 0) return;
  flow.heading('Supports', 30);
  flow.paragraph(
    'The worst over all combinations. Ground contact alone holds no uplift: an anchor or ballast must, and the ballast given holds it at 0.9 of its weight. Every combination stands in forces/supports.csv.',
  );
  const tips = solution?.overturning;
  if (tips)
    flow.paragraph(
      tips.ratio === null
        ? `Nothing holds it down against tipping over ${tips.edge.join('-')} under ${tips.combination}.`
        : `Nearest to tipping over: ${tips.edge.join('-')} under ${tips.combination}, where overturning is ${fixed(tips.ratio, 2)} of what holds it.`,
    );
  // Columns name the sense, so a sign would only be read as tension.
  const force = (n: number): string => units.force(n).replace('+', '');
  flow.table(
    [
      { head: 'Support', bold: true, value: (r: SupportRow) => r.node },
      { head: `Pressed\n${units.forceUnit}`, align: 'right', value: (r) => force(r.pressed.pressure) },
      { head: `Lifted\n${units.forceUnit}`, align: 'right', bold: true, value: (r) => some(r.lifted.uplift, force) },
      { head: `Ballast\n${units.massUnit}`, align: 'right', value: (r) => some(r.lifted.ballast, units.mass) },
      {
        head: `Shear then\n${units.forceUnit}`,
        align: 'right',
        value: (r) => (r.lifted.uplift > 0 ? force(r.lifted.shear) : ''),
      },
      { head: 'Lifted most by', wraps: true, value: (r) => (r.lifted.uplift > 0 ? r.lifted.combination : 'nothing') },
      { head: `Most shear\n${units.forceUnit}`, align: 'right', value: (r) => force(r.pushed.shear) },
    ],
    rowsOf(demands),
  );
}

const some = (value: number, say: (v: number) => string): string => (value > 0 ? say(value) : '');

function rowsOf(demands: readonly SupportDemand[]): SupportRow[] {
  const rows = new Map<string, SupportRow>();
  for (const d of demands) {
    const old = rows.get(d.node) ?? { node: d.node, pressed: d, lifted: d, pushed: d };
    rows.set(d.node, {
      node: d.node,
      pressed: d.pressure > old.pressed.pressure ? d : old.pressed,
      lifted: d.uplift > old.lifted.uplift ? d : old.lifted,
      pushed: d.shear > old.pushed.shear ? d : old.pushed,
    });
  }
  return [...rows.values()].sort((a, b) => b.lifted.uplift - a.lifted.uplift || byMark(a.node, b.node));
}
