import { z } from 'zod';

/** Which rules judge the parts. */
export const strengthSchema = z
  .strictObject({
    standard: z
      .enum(['auto', 'EN 1995-1-1', 'EN 1993-1-1', 'EN 1999-1-1', 'NDS', 'allowable'])
      .default('auto')
      .describe('auto: by the material of each strut; shop dowels by allowable stress.'),
    serviceClass: z
      .union([z.literal(1), z.literal(2), z.literal(3)])
      .optional()
      .describe('EN 1995-1-1 2.3.1.3; outdoors it must be given.'),
    allowableFactor: z.number().min(1).default(3).describe('Factor of safety of the allowable-stress rule.'),
    duration: z
      .enum(['permanent', 'long', 'medium', 'short', 'instantaneous'])
      .default('permanent')
      .describe('Load duration of the given forces, for kmod.'),
    effectiveLength: z.number().positive().default(1).describe('Effective length over node-to-node length.'),
  })
  .prefault({})
  .describe('Which rules judge the parts.');
