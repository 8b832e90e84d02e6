import { z } from 'zod';
import { FIT } from '../tolerance.js';

/** The workshop's tolerances. Round-off tolerances are not here: they cannot be set. */
export const fitSchema = z
  .strictObject({
    residualWarn: z
      .number()
      .positive()
      .default(FIT.residualWarn.value)
      .describe('Residual at a node over the largest member force there.'),
    residualStop: z
      .number()
      .positive()
      .default(FIT.residualStop.value)
      .describe('The same, from where the forces are not those of this form.'),
    flatnessWarn_mm: z
      .number()
      .positive()
      .default(FIT.flatnessWarn.value)
      .describe('Largest distance of a corner from the plane of its face, mm.'),
    flatnessStop_mm: z
      .number()
      .positive()
      .optional()
      .describe('Absent: what the panel seat can take, half the gap and at least the warning.'),
    cut_mm: z.number().nonnegative().default(0.25).describe('Spread of a cut length.'),
    hubShrinkage: z.number().nonnegative().default(0.003).describe('Spread of a hub size as a share.'),
    socketAngle_deg: z.number().nonnegative().default(0.5).describe('Spread of the direction of a socket, degrees.'),
    moisture: z.number().nonnegative().default(0.0005).describe('Spread of a strut length by moisture, as a share.'),
    distribution: z
      .enum(['normal', 'uniform'])
      .default('normal')
      .describe('Of each error; a tolerance is two standard deviations of a normal one.'),
    samples: z.int().positive().max(1_000_000).default(10_000).describe('Trials of the fit-up of the whole.'),
    chance: z.number().gt(0).lt(1).default(0.95).describe('Wanted chance that every loop closes.'),
    moistureChange: z
      .number()
      .nonnegative()
      .default(8)
      .describe('Change of moisture outdoors, per cent, that sockets must take.'),
  })
  .prefault({})
  .describe("The workshop's tolerances.");
