import { entry, num } from './entry.js';

/** Findings on the job's waivers and on checks that its use asks for. */
export const WAIVER_FINDINGS = {
  'waiver-idle': entry(
    'note',
    'truss',
    '',
    (f) => `a waiver of ${f.about?.['code']} covers nothing; remove it from the job`,
  ),
  'waiver-void': entry(
    'note',
    'truss',
    '',
    (f) =>
      `its waiver of ${f.about?.['code']} is void: ${f.about?.['why']} (value ${num(f.value)}, up to ${num(f.limit)})`,
  ),
  'check-missing': entry(
    'warn',
    'truss',
    '',
    (f) => `was not checked for ${f.about?.['check']}, which the use "${f.about?.['use']}" asks for`,
  ),
} as const;
