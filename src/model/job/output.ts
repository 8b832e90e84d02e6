import { z } from 'zod';

/** Papers and units of what is written for people. Machine files are always mm. */
export const outputSchema = z
  .strictObject({
    paper: z.enum(['A4', 'A3', 'Letter']).default('A4').describe('Paper of the sheets.'),
    units: z.enum(['SI', 'US']).default('SI').describe('US: inches and pounds-force in papers.'),
    fractions: z.boolean().default(false).describe('US only: inches as fractions to 1/32.'),
    csv: z
      .enum(['comma', 'semicolon'])
      .default('comma')
      .describe('semicolon: decimal comma and a byte-order mark, for spreadsheets that want them.'),
    projection: z
      .enum(['first-angle', 'third-angle'])
      .default('first-angle')
      .describe('Arrangement of views: first angle in Europe, third in the United States.'),
    labels: z
      .enum(['A4-3x8', 'A4-3x7', 'Letter-3x10'])
      .default('A4-3x8')
      .describe('Label sheet: paper and labels across x down.'),
  })
  .prefault({})
  .describe('Papers and units of what is written for people.');

export const waiversSchema = z
  .array(
    z.strictObject({
      code: z.string().describe('Code of the finding, as in check.json.'),
      subject: z.string().describe('Mark of the part, as in check.json.'),
      upTo: z.number().optional().describe('A worse value voids the waiver.'),
      reason: z.string().min(1).describe('Why it may stand.'),
      by: z.string().min(1).describe('Who answers for it.'),
    }),
  )
  .default([])
  .describe('Stops that somebody answers for.');
