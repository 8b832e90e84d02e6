import { fixed, sawMillimetres } from '../../documents/kit/units.js';
import { barBatches } from '../../documents/struts/bar-batches.js';
import { buyingLines } from '../../documents/struts/buying-list.js';
import { sayProof } from '../../documents/struts/proof.js';
import type { StockPlan } from '../../model/plan.js';

/** A cutting plan in sentences: what to fetch, then every batch of bars with its cuts in sawing order. */
export function sayCutting(plan: StockPlan, currency: string): string {
  const money = currency === '' ? '' : ` ${currency}`;
  const lines: string[] = [];
  for (const section of plan.sections) {
    const bars = plan.bars.filter((b) => b.section === section.section);
    lines.push(
      `${section.section}: ${section.bars} ${section.bars === 1 ? 'bar' : 'bars'}, ${fixed(section.cost, 2)}${money}. ${sayProof(section, currency)}`,
    );
    const fetched = buyingLines(bars);
    const width = Math.max(0, ...fetched.map((l) => String(l.quantity).length));
    for (const l of fetched)
      lines.push(
        `  ${String(l.quantity).padStart(width)} of ${fixed(l.length, 1)} mm${l.fromRack ? ', from the rack' : ''}`,
      );
    for (const { bars: batch, settings } of barBatches(bars, sawMillimetres)) {
      const cuts = settings.map((s) => `${s.times > 1 ? `${s.times} x ` : ''}${sawMillimetres(s.length)}`).join(', ');
      const name = batch.length > 1 ? `${batch[0]!.mark} to ${batch.at(-1)!.mark}` : batch[0]!.mark;
      lines.push(`  ${name}, ${fixed(batch[0]!.length, 1)} mm: ${cuts}; left ${fixed(batch[0]!.offcut, 1)}`);
    }
  }
  return `${lines.join('\n')}\n`;
}
