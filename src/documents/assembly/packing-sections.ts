import type { Bag } from '../../model/assembly.js';
import { CAUTIONS } from '../cautions.js';
import { Flow } from '../kit/flow.js';
import type { Paper } from '../kit/paper.js';
import { fixed, type Units } from '../kit/units.js';
import type { PackRecords } from '../records.js';

/** The last sheets of the order of building: panels, closing struts, bags, spares, bench units, fit-up, cautions. */
export function packingSections(paper: Paper, records: PackRecords, units: Units): void {
  const plan = records.assembly;
  paper.addSheet({
    title: 'Panels, bags and spares',
    instruction:
      'Panels go on when all struts are in, the lowest first. Pack by step, a bag a row: every part is in exactly one bag.',
  });
  const flow = new Flow(paper);
  if (!plan) return;
  const panels = plan.steps.filter((s) => s.kind === 'panel');
  if (panels.length > 0) {
    flow.heading('Panels, in their order');
    flow.table(
      [
        { head: '', tick: true },
        { head: 'Step', align: 'right', value: (s) => String(s.number) },
        { head: 'Panel', bold: true, value: (s) => s.panels.join(', ') },
        { head: `Mass\n${units.massUnit}`, align: 'right', value: (s) => units.mass(s.mass_kg) },
      ],
      panels,
    );
  }
  if (plan.closing.length > 0) {
    flow.heading('Closing struts');
    flow.paragraph(
      'These go in between hubs that both stand: two blind sockets do not let them. Each needs a closing detail at one end.',
    );
    flow.table(
      [
        { head: 'Strut', bold: true, value: (e) => e.strut },
        {
          head: 'Detail',
          value: (e) => (e.detail ? `${e.detail.kind} at ${e.detail.node}` : 'none yet: give one in the job'),
        },
      ],
      plan.closing,
    );
  }
  flow.heading('Bags', 40);
  flow.table(
    [
      { head: '', tick: true },
      { head: 'Bag', bold: true, value: (b: Bag) => b.name },
      { head: 'Steps', value: (b) => (b.steps[0] === b.steps[1] ? String(b.steps[0]) : `${b.steps[0]}–${b.steps[1]}`) },
      { head: `Mass\n${units.massUnit}`, align: 'right', value: (b) => units.mass(b.mass_kg) },
      { head: 'Parts', wraps: true, value: (b) => partsOf(b) },
    ],
    plan.bags,
  );
  const total = plan.bags.reduce((sum, b) => sum + b.mass_kg, 0);
  flow.paragraph(`All bags together: ${units.mass(total)} ${units.massUnit}.`, { bold: true });
  if (plan.spares.length > 0) {
    flow.heading('Spares', 30);
    flow.table(
      [
        { head: 'What', value: (s) => s.what },
        { head: 'Count', align: 'right', bold: true, value: (s) => String(s.count) },
      ],
      plan.spares,
    );
  }
  if (plan.units.length > 0) {
    flow.heading('What can be built flat on the bench', 40);
    flow.table(
      [
        { head: 'Face', bold: true, value: (u) => u.face },
        {
          head: `Size\n${units.lengthUnit}`,
          align: 'right',
          value: (u) => `${units.length(u.size_mm[0], 0)} × ${units.length(u.size_mm[1], 0)}`,
        },
        { head: `Mass\n${units.massUnit}`, align: 'right', value: (u) => units.mass(u.mass_kg) },
        { head: 'People', align: 'right', value: (u) => (u.lifted ? String(u.people) : `${u.people}: too many`) },
        { head: 'Through the door', value: (u) => (u.throughDoor ? 'yes' : 'no') },
        { head: 'In the van', value: (u) => (u.inVan ? 'yes' : 'no') },
        { head: 'Hubs', wraps: true, value: (u) => u.hubs.join(', ') },
      ],
      plan.units,
    );
  }
  fitUpSection(flow, records, units);
  flow.heading('What to mind');
  for (const { trade, words } of CAUTIONS) if (trade === 'Building' || trade === 'Standing') flow.paragraph(words);
}

const partsOf = (b: Bag): string =>
  [
    b.hubs.length > 0 ? `${b.hubs.length} hubs: ${b.hubs.join(', ')}` : '',
    b.struts.length > 0 ? `${b.struts.length} struts: ${b.struts.join(', ')}` : '',
    b.panels.length > 0 ? `${b.panels.length} panels: ${b.panels.join(', ')}` : '',
  ]
    .filter((t) => t !== '')
    .join('. ');

function fitUpSection(flow: Flow, records: PackRecords, units: Units): void {
  const f = records.fitUp;
  if (!f) return;
  flow.heading('Will it go together?');
  const loops = f.loops.length === 1 ? 'one loop' : `${f.loops.length} loops`;
  flow.paragraph(
    f.loops.length === 0
      ? 'No closed loop of struts asks for matching lengths: errors of the cuts only move the nodes.'
      : `${loops[0]!.toUpperCase()}${loops.slice(1)} of struts must close. Chance that every one closes within its play: ${fixed(100 * f.chance, 1)} % (${f.samples} samples), wanted ${fixed(100 * f.wanted, 0)} %.`,
  );
  if (f.cutNeeded_mm !== null)
    flow.paragraph(`Cuts within ± ${units.length(f.cutNeeded_mm, 2)} ${units.lengthUnit} are good enough for that.`);
  if (f.movedMost)
    flow.paragraph(
      `The node that errors move most is ${f.movedMost.node}: ± ${units.length(2 * f.movedMost.deviation_mm, 1)} ${units.lengthUnit}.`,
    );
}
