import { caseNameProblem } from '../model/marks.js';
import { type Fault, quoted } from './fault.js';
import { checkPrinters } from './job-printers.js';
import { checkSections } from './job-sections.js';
import type { JsonDocument } from './json-document.js';
import { items, textOf } from './loose.js';

/** Control characters, lone surrogates, separators but the space: what no sheet can print. */
const NOT_PRINTABLE = /[\p{Cc}\p{Cs}\p{Zl}\p{Zp}]/u;
const PRINTED = ['title', 'owner', 'number', 'drawnBy', 'approvedBy'] as const;

/** What a schema cannot say of a job file: printable names, cases named once. */
export function checkJob(document: JsonDocument): Fault[] {
  const faults: Fault[] = [];
  for (const key of PRINTED) {
    const text = textOf(document.value, key);
    if (text !== null && NOT_PRINTABLE.test(text))
      faults.push(document.fault(document.offset([key]), `${key} holds a character that does not print`, 'remove it'));
  }
  const loads = (document.value as { loads?: unknown } | null)?.loads;
  const seen = new Set<string>();
  items(loads, 'cases').forEach((item, i) => {
    const name = textOf(item, 'name');
    if (name === null) return;
    const offset = document.offset(['loads', 'cases', i, 'name']);
    const problem = caseNameProblem(name);
    if (problem) faults.push(document.fault(offset, `${quoted(name)} ${problem.what}`, problem.mend));
    if (seen.has(name))
      faults.push(document.fault(offset, `the case ${quoted(name)} stands twice`, 'rename one of them'));
    seen.add(name);
  });
  return [...faults, ...checkSections(document), ...checkPrinters(document)];
}
