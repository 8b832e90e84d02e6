import { entry } from './entry.js';

/** Findings of the inputs stage. */
export const INPUTS_FINDINGS = {
  'name-unknown': entry('warn', 'truss', '', (f) => {
    const near = f.about?.['near'];
    return `${f.about?.['key']} of the job names this ${f.about?.['what']}, which the truss does not have; ${near ? `write ${near}, or` : 'correct the name, or'} remove the entry`;
  }),
} as const;
