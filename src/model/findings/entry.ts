import type { FindingEntry, Level, SubjectKind } from '../finding.js';

/** A catalogue entry, with the usual answers filled in. */
export function entry(
  level: Level,
  kind: SubjectKind,
  unit: string,
  words: FindingEntry['words'],
  special: { readonly waivable?: boolean; readonly withholds?: boolean } = {},
): FindingEntry {
  return {
    level,
    kind,
    unit,
    words,
    waivable: special.waivable ?? true,
    withholds: special.withholds ?? false,
  };
}

/** A number for a sentence: three decimals for mm and N at most, no trailing noughts; "unknown" for null. */
export function num(value: number | null | undefined, decimals = 3): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return 'unknown';
  const text = value.toFixed(decimals);
  return (text.includes('.') ? text.replace(/0+$/, '').replace(/\.$/, '') : text).replace('-', '−');
}
