import type { Job } from '../../model/job/index.js';
import type { StockPlan } from '../../model/plan.js';
import { writeJson } from '../formats/json.js';
import type { PackRecords } from '../records.js';

export type RackEntry = Job['stock']['rack'][number];

/** Offcuts a person measures to the whole mm: less is written down than is there, never more. */
const RACK_STEP_MM = 1;

/**
 * What the rack holds once the plan is sawn: offcuts that were not touched, and the new ones long enough to keep. Marks
 * are those of the bars with an R behind, and another R as long as the rack has that mark already.
 */
export function rackAfter(plan: StockPlan, job: Job): RackEntry[] {
  const used = new Set(plan.bars.filter((b) => b.fromRack).map((b) => `${b.section} ${b.stock}`));
  const nth = new Map<string, number>();
  const untouched = job.stock.rack.filter((r) => {
    const n = (nth.get(r.section) ?? 0) + 1;
    nth.set(r.section, n);
    return !used.has(`${r.section} ${r.mark ?? `rack ${n}`}`);
  });
  const taken = new Set(untouched.flatMap((r) => (r.mark === undefined ? [] : [r.mark])));
  const fresh = plan.bars
    .filter((b) => b.kept)
    .map((b): RackEntry => {
      let mark = `${b.mark}R`;
      while (taken.has(mark)) mark += 'R';
      taken.add(mark);
      return { section: b.section, length_mm: Math.floor(b.offcut / RACK_STEP_MM) * RACK_STEP_MM, mark };
    });
  return [...untouched, ...fresh];
}

/** offcuts.json: the rack after this job; `stock.rack` of the next job takes it as it stands. */
export function offcutsJson(records: PackRecords): Uint8Array {
  return writeJson({ stock: { rack: records.stock ? rackAfter(records.stock, records.job) : records.job.stock.rack } });
}
