import type { PlannedBar } from '../../model/plan.js';
import { type CsvColumn, DECIMALS, writeCsv } from '../formats/csv.js';
import type { PackRecords } from '../records.js';

/** One kind of bar and how many of it the plan uses. */
export interface BuyingLine {
  readonly section: string;
  readonly stock: string;
  readonly length: number;
  readonly quantity: number;
  readonly each: number;
  readonly price: number;
  readonly fromRack: boolean;
}

/** The bars of a plan by kind, bought ones first, in the plan's order. */
export function buyingLines(bars: readonly PlannedBar[]): BuyingLine[] {
  const byKind = new Map<string, PlannedBar[]>();
  for (const bar of bars) {
    const key = JSON.stringify([bar.section, bar.fromRack, bar.stock, bar.length]);
    const group = byKind.get(key);
    if (group) group.push(bar);
    else byKind.set(key, [bar]);
  }
  const lines = [...byKind.values()].map((group): BuyingLine => {
    const { section, stock, length, price, fromRack } = group[0]!;
    return { section, stock, length, quantity: group.length, each: price, price: price * group.length, fromRack };
  });
  return [...lines.filter((l) => !l.fromRack), ...lines.filter((l) => l.fromRack)];
}

/** buying-list.csv: what to buy and what to fetch from the rack. */
export function buyingListCsv(records: PackRecords): Uint8Array {
  const columns: CsvColumn<BuyingLine>[] = [
    { name: 'section', value: (l) => l.section },
    { name: 'stock', value: (l) => l.stock },
    { name: 'length_mm', decimals: DECIMALS.length, value: (l) => l.length },
    { name: 'quantity', value: (l) => l.quantity },
    { name: 'price_each', decimals: 2, value: (l) => l.each },
    { name: 'price', decimals: 2, value: (l) => l.price },
    { name: 'from', value: (l) => (l.fromRack ? 'rack' : 'shop') },
  ];
  return writeCsv(columns, buyingLines(records.stock?.bars ?? []), records.job.output.csv);
}
