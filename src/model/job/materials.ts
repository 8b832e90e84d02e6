import { z } from 'zod';

const sectionShape = z.union([
  z.strictObject({
    kind: z.literal('round').describe('A round rod.'),
    diameter_mm: z.number().positive().describe('Outside diameter, mm.'),
  }),
  z.strictObject({
    kind: z.literal('tube').describe('A round tube.'),
    diameter_mm: z.number().positive().describe('Outside diameter, mm.'),
    wall_mm: z.number().positive().describe('Wall of the tube, mm.'),
  }),
  z.strictObject({
    kind: z.literal('rectangle').describe('A rectangular bar.'),
    width_mm: z.number().positive().describe('Along the local y of the strut, mm.'),
    height_mm: z.number().positive().describe('Along the local z of the strut, mm.'),
  }),
]);

/** Sections and materials that the catalogue lacks, or values the user has measured. */
export const sectionsSchema = z
  .record(
    z.string(),
    z.strictObject({
      shape: sectionShape.describe('Round, tube or rectangle.'),
      material: z.string().describe('Name of a material, from the catalogue or `materials`.'),
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
      title: z.string().optional().describe('Name in words, for papers.'),
      family: z
        .enum(['timber', 'glulam', 'steel', 'aluminium', 'plastic-print', 'acrylic', 'board', 'plastic-sheet'])
        .optional()
        .describe('Decides the standard and the checks. Absent: of the material it is like, else board.'),
      density_kg_per_m3: z.number().positive().optional().describe('Mean density, kg/m³.'),
      modulus_MPa: z.number().positive().optional().describe('Mean modulus of elasticity along the strut, MPa.'),
      modulus05_MPa: z.number().positive().optional().describe('5 % fractile along the grain, for EN 1995-1-1.'),
      shearModulus_MPa: z.number().positive().optional().describe('Mean shear modulus, MPa.'),
      poisson: z.number().min(0).lt(0.5).optional().describe('Poisson ratio.'),
      expansion_per_K: z.number().nonnegative().optional().describe('Growth by temperature as a share, per K.'),
      densityK_kg_per_m3: z
        .number()
        .positive()
        .optional()
        .describe('Characteristic density, for bolts and pins in timber.'),
      softening_C: z.number().optional().describe('Temperature at which it softens, °C.'),
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
