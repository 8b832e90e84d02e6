import { type Job, jobSchema } from '../model/job/index.js';
import type { Fault } from './fault.js';
import { checkJob } from './job-checks.js';
import { parseJson } from './json-document.js';
import { inOrder } from './order.js';
import { checkSchema } from './schema-faults.js';

/**
 * Reads a job file, `strutwright-job/1`, and fills in every default: the job, or null with every fault of the file in
 * the order of its lines. `name` is what the faults call the file. Never throws.
 */
export function readJob(text: string, name: string): { readonly job: Job | null; readonly faults: readonly Fault[] } {
  const document = parseJson(text, name);
  if (document.value === undefined) return { job: null, faults: document.faults };
  const { value, faults } = checkSchema(document, jobSchema);
  const all = inOrder([...document.faults, ...faults, ...checkJob(document)]);
  return { job: value && all.length === 0 ? withoutInheritance(value) : null, faults: all };
}

/** The same record with objects that have their own keys only: a group may be called "constructor". */
function withoutInheritance<T>(value: T): T {
  if (Array.isArray(value)) return value.map(withoutInheritance) as T;
  if (value === null || typeof value !== 'object') return value;
  const out = Object.create(null) as Record<string, unknown>;
  for (const [key, part] of Object.entries(value)) out[key] = withoutInheritance(part);
  return out as T;
}
