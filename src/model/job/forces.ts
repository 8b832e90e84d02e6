import { z } from 'zod';

/** Where the member forces come from. */
export const forcesSchema = z
  .strictObject({
    source: z
      .enum(['given', 'reciprocal', 'analysis'])
      .optional()
      .describe('Default: given where the truss has forces, else reciprocal where it has cells, else analysis.'),
    sign: z
      .union([z.literal(1), z.literal(-1)])
      .optional()
      .describe('Sign of a reciprocal diagram that nothing else signs.'),
    largest_N: z.number().positive().optional().describe('Largest member force that a found diagram is scaled to, N.'),
    fix: z
      .array(
        z.strictObject({
          strut: z.string().describe('Mark of the strut.'),
          force_N: z.number().describe('Its force, N, tension positive.'),
        }),
      )
      .default([])
      .describe('Forces of some struts, N, that pick one diagram out of several.'),
    pattern: z
      .record(z.string(), z.enum(['tension', 'compression']))
      .default({})
      .describe('Sign wanted in a group of struts, by group.'),
  })
  .prefault({})
  .describe('Where the member forces come from.');
