import { jobSchema } from '../../src/model/job/index.js';
import type { Truss } from '../../src/model/truss.js';
import { assess } from '../../src/pipeline/assess.js';

/** A truss with all its parts, from a job of a few fields. */
export const assembled = (truss: Truss, fields: Record<string, unknown> = {}) =>
  assess(truss, jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', ...fields }));
