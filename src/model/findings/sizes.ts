import { entry, num } from './entry.js';

/** Findings of choosing sections. */
export const SIZE_FINDINGS = {
  'no-section-passes': entry('stop', 'strut', '', (f) =>
    f.value === null
      ? `no section of the job's sizes could be judged; the heaviest is ${f.about?.['section']}`
      : `no section of the job's sizes passes; the heaviest, ${f.about?.['section']}, is at ${num(f.value, 2)}; add stronger ones under struts.sizes`,
  ),
  'size-unknown': entry(
    'warn',
    'truss',
    '',
    (f) => `"${f.about?.['section']}" under struts.sizes is not in the catalogue or the job and was left out`,
  ),
  'sizes-missing': entry(
    'stop',
    'truss',
    '',
    (f) => `no section to choose from: ${f.about?.['reason']}; list known sections under struts.sizes`,
  ),
} as const;
