import { entry, num } from './entry.js';

/** Findings of the stock plan. */
export const STOCK_FINDINGS = {
  'strut-longer-than-stock': entry(
    'stop',
    'strut',
    'mm',
    (f) =>
      `${num(f.value)} mm long, longer than the ${num(f.limit)} mm that any bar of ${f.about?.['section']} gives; add a longer bar under "stock" or splice the strut`,
  ),
  'stock-runs-out': entry(
    'stop',
    'strut',
    'mm',
    (f) => `${num(f.value)} mm of ${f.about?.['section']} is not left in stock; raise "available" or add another bar`,
  ),
} as const;
