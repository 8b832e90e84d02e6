import { z } from 'zod';
import { jobSchema } from './job/index.js';
import { trussFileSchema } from './truss-file.js';

/** The JSON Schemas (draft 2020-12) of the two input files, by the file name they are shipped under in templates/. */
export function jsonSchemas(): Readonly<Record<string, object>> {
  const write = (schema: z.ZodType, title: string): object => ({
    ...z.toJSONSchema(schema, { io: 'input', override: exactTuples }),
    title,
  });
  return {
    'truss.schema.json': write(trussFileSchema, 'Truss file, strutwright-truss/1'),
    'job.schema.json': write(jobSchema, 'Job file, strutwright-job/1'),
  };
}

/** A tuple of the schema has its exact length, which the conversion leaves open. */
function exactTuples(context: { zodSchema: z.core.$ZodType; jsonSchema: z.core.JSONSchema.BaseSchema }): void {
  const { prefixItems } = context.jsonSchema;
  if (prefixItems) Object.assign(context.jsonSchema, { minItems: prefixItems.length, maxItems: prefixItems.length });
}
