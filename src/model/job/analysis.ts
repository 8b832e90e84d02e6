import { z } from 'zod';

/** How the structure is analysed. */
export const analysisSchema = z
  .strictObject({
    joints: z
      .enum(['pinned', 'rigid'])
      .default('rigid')
      .describe('pinned: struts turn freely in their nodes; rigid: the hubs hold their angles.'),
    socketStiffness_Nmm_per_rad: z
      .number()
      .positive()
      .optional()
      .describe(
        'Rotational stiffness of one socket, measured or estimated, N mm/rad; makes rigid joints semi-rigid. Absent: from the node system.',
      ),
    selfWeight: z.boolean().default(true).describe('Whether struts, hubs and panels weigh anything.'),
    buckling: z.boolean().default(true).describe('Whether the lowest load factors of the whole are found.'),
    secondOrder: z
      .boolean()
      .default(false)
      .describe('Second-order analysis with imperfections where the critical load factor is low.'),
    imperfection: z
      .number()
      .positive()
      .default(0.0025)
      .describe('Initial sway as a share of the height (EN 1993-1-1 5.3.2: 1/200 to 1/400).'),
    selfStress: z
      .strictObject({
        device: z.string().describe('How self-stress is put in: turnbuckle, shortened strut, wedge.'),
        strut: z.string().describe('The strut that it is put in by.'),
        by_mm: z.number().describe('Shortening of that strut, mm.'),
      })
      .optional()
      .describe('Absent: self-stress is not assumed to exist in the built thing.'),
    climber_N: z
      .number()
      .nonnegative()
      .default(1000)
      .describe('A person at any node in turn, N, where the use asks for it.'),
  })
  .prefault({})
  .describe('How the structure is analysed.');
