import type { SectionPlan } from '../../model/plan.js';
import { fixed } from '../kit/units.js';

/** How good a section's plan is known to be, in one sentence. */
export function sayProof(s: SectionPlan, currency: string): string {
  const unit = currency === '' ? '' : ` ${currency}`;
  if (s.proven) return 'Proven: no plan for these pieces costs less.';
  if (s.lowerBound <= 0) return 'Some struts are on no bar: the report names them.';
  const gap = (100 * (s.cost - s.lowerBound)) / s.lowerBound;
  return `No plan can cost less than ${fixed(s.lowerBound, 2)}${unit}; this one costs ${fixed(s.cost, 2)}${unit}, ${fixed(gap, 1)} % more.`;
}
