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
      family: z
        .enum(['timber', 'glulam', 'steel', 'aluminium', 'plastic-print', 'acrylic', 'board', 'plastic-sheet'])
        .optional()
        .describe('Decides the standard and the checks. Absent: of the material it is like, else board.'),
      density_kg_per_m3: z.number().positive().optional(),
      modulus_MPa: z.number().positive().optional(),
      modulus05_MPa: z.number().positive().optional().describe('5 % fractile along the grain, for EN 1995-1-1.'),
      shearModulus_MPa: z.number().positive().optional(),
      poisson: z.number().min(0).lt(0.5).optional(),
      expansion_per_K: z.number().nonnegative().optional(),
      densityK_kg_per_m3: z
        .number()
        .positive()
        .optional()
        .describe('Characteristic density, for bolts and pins in timber.'),
      softening_C: z.number().optional(),
      buckling: z
        .enum(['a0', 'a', 'b', 'c', 'd', 'A', 'B'])
        .optional()
        .describe('Buckling curve of EN 1993-1-1 or class of EN 1999-1-1.'),
      strength_MPa: z
        .record(z.string(), z.number().positive())
        .default({})
        .describe('By symbol: fmk ft0k fc0k fvk, ft fc fv ftZ ...'),
      source: z.string().optional().describe('Where the values come from: a test report, a data sheet.'),
    }),
  )
  .default({})
  .describe('Materials by name, besides the catalogue. Your own test values go here.');
