import type { PlannedBar } from '../../model/plan.js';

/** Bars of one kind that are sawn alike, one after the other: set the stop once for all of them. */
export interface BarBatch {
  readonly bars: readonly PlannedBar[];
  /** Stop settings in sawing order: a length and how often it is cut from each bar. */
  readonly settings: readonly { readonly length: number; readonly times: number }[];
}

/** Puts neighbours in the plan that are equal in kind and in every length as it is printed together: a saw is set by the print. */
export function barBatches(bars: readonly PlannedBar[], print: (mm: number) => string): BarBatch[] {
  const batches: PlannedBar[][] = [];
  for (const bar of bars) {
    const last = batches.at(-1);
    if (last && alike(last[0]!, bar, print)) last.push(bar);
    else batches.push([bar]);
  }
  return batches.map((group) => ({ bars: group, settings: settingsOf(group[0]!, print) }));
}

const alike = (a: PlannedBar, b: PlannedBar, print: (mm: number) => string): boolean =>
  a.section === b.section &&
  a.stock === b.stock &&
  a.fromRack === b.fromRack &&
  a.cuts.length === b.cuts.length &&
  a.cuts.every((cut, i) => print(cut.length) === print(b.cuts[i]!.length));

function settingsOf(bar: PlannedBar, print: (mm: number) => string): { length: number; times: number }[] {
  const settings: { length: number; times: number }[] = [];
  for (const { length } of bar.cuts) {
    const last = settings.at(-1);
    if (last && print(last.length) === print(length)) last.times++;
    else settings.push({ length, times: 1 });
  }
  return settings;
}
