import { z } from 'zod';

const sectionShape = z.union([
  z.strictObject({
    kind: z.literal('round'),
    diameter_mm: z.number().positive(),
  }),
  z.strictObject({
    kind: z.literal('tube'),
    diameter_mm: z.number().positive(),
    wall_mm: z.number().positive(),
  }),
  z.strictObject({
    kind: z.literal('rectangle'),
    width_mm: z.number().positive(),
    height_mm: z.number().positive(),
  }),
]);

/** Sections and materials that the catalogue lacks, or values the user has measured. */
export const sectionsSchema = z
  .record(
    z.string(),
    z.strictObject({
      shape: sectionShape,
      material: z.string(),
      measured_mm: z.number().positive().optional().describe('Largest diameter or side measured on the batch.'),
    }),
  )
  .default({})
  .describe('Sections by name, besides the catalogue.');

export const materialsSchema = z
  .record(
    z.string(),
    z.strictObject({
      like: z.string().optional().describe('A material of the catalogue whose other values hold.'),
      title: z.string().optional(),
      density_kg_per_m3: z.number().positive().optional(),
      modulus_MPa: z.number().positive().optional(),
      softening_C: z.number().optional(),
      strength_MPa: z
        .record(z.string(), z.number().positive())
        .default({})
        .describe('By symbol: fmk ft0k fc0k fvk, ft fc fv ftZ ...'),
      source: z.string().optional().describe('Where the values come from: a test report, a data sheet.'),
    }),
  )
  .default({})
  .describe('Materials by name, besides the catalogue. Your own test values go here.');
