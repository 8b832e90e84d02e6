import { writeJson } from '../formats/json.js';
import type { PackRecords } from '../records.js';

/** struts/stock-plan.json: every bar with its cuts in sawing order, what is left of it, the cost and its proven lower bound. */
export function stockPlanJson(records: Pick<PackRecords, 'job' | 'stock'>): Uint8Array {
  const plan = records.stock;
  return writeJson({
    format: 'strutwright-stock-plan/1',
    kerf_mm: records.job.saw.kerf_mm,
    end_trim_mm: records.job.saw.endTrim_mm,
    currency: records.job.stock.currency,
    cost: plan?.cost ?? null,
    lowerBound: plan?.lowerBound ?? null,
    proven: plan?.proven ?? null,
    sections: plan?.sections ?? [],
    bars: (plan?.bars ?? []).map((b) => ({
      mark: b.mark,
      section: b.section,
      stock: b.stock,
      length_mm: b.length,
      price: b.price,
      fromRack: b.fromRack,
      cuts: b.cuts.map((c) => ({ mark: c.mark, length_mm: c.length })),
      offcut_mm: b.offcut,
      kept: b.kept,
    })),
  });
}
