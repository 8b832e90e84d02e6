import { z } from 'zod';

/** Who, what and when: what stands in every title block. */
export const identityShape = {
  format: z.literal('strutwright-job/1').describe('Names this file format and its version.'),
  title: z.string().min(1).max(120).describe('Title of the work, printed on every sheet.'),
  truss: z.string().min(1).describe('Path of the truss file, from the folder of this job.'),
  owner: z.string().max(80).default('').describe('Legal owner of the drawings (ISO 7200).'),
  number: z.string().max(40).default('').describe('Identification number of the drawings (ISO 7200).'),
  drawnBy: z.string().max(80).default('').describe('Who drew it (ISO 7200).'),
  approvedBy: z.string().max(80).default('').describe('Who approved it (ISO 7200).'),
  date: z.iso
    .date()
    .nullable()
    .default(null)
    .describe('Date of issue, year-month-day; printed and stored in the files. The clock is never read.'),
  revision: z
    .string()
    .regex(/^[A-Z]{1,2}$/)
    .default('A')
    .describe('Revision letter of this issue.'),
  use: z
    .enum(['table', 'display', 'outdoor', 'overhead'])
    .default('table')
    .describe(
      'What the thing is for; decides what must be checked: people can be under `overhead`, weather is on `outdoor`.',
    ),
  scale: z.number().positive().default(1).describe('Factor on every length of the truss file: 0.2 makes a 1:5 model.'),
  forceScale: z
    .number()
    .positive()
    .default(1)
    .describe('Factor on every force of the truss file; forces are never scaled in silence.'),
  seed: z.int().min(0).max(4294967295).default(1).describe('Seed of every search that uses random numbers.'),
} as const;
