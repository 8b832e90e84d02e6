import { z } from 'zod';
import { analysisSchema } from './analysis.js';
import { assemblySchema } from './assembly.js';
import { fitSchema } from './fit.js';
import { forcesSchema } from './forces.js';
import { identityShape } from './identity.js';
import { loadsSchema } from './loads.js';
import { materialsSchema, sectionsSchema } from './materials.js';
import { nodesSchema, printersSchema } from './nodes.js';
import { outputSchema, waiversSchema } from './output.js';
import { cutterSchema, panelsSchema, sheetsSchema } from './panels.js';
import { strengthSchema } from './strength.js';
import { sawSchema, stockSchema, strutsSchema } from './struts.js';

/** The job: every key with its default, a section a file. */
export const jobSchema = z.strictObject({
  $schema: z.string().optional().describe('Where an editor finds the JSON Schema of this file.'),
  ...identityShape,
  forces: forcesSchema,
  analysis: analysisSchema,
  loads: loadsSchema,
  strength: strengthSchema,
  sections: sectionsSchema,
  materials: materialsSchema,
  struts: strutsSchema,
  saw: sawSchema,
  stock: stockSchema,
  nodes: nodesSchema,
  printers: printersSchema,
  panels: panelsSchema,
  sheets: sheetsSchema,
  cutter: cutterSchema,
  fit: fitSchema,
  assembly: assemblySchema,
  output: outputSchema,
  waivers: waiversSchema,
});

export type Job = Readonly<z.infer<typeof jobSchema>>;

/** The job with every default, for one title: what library callers and tests start from. */
export const defaultJob = (title = 'Untitled'): Job =>
  jobSchema.parse({ format: 'strutwright-job/1', title, truss: 'truss.json' });
