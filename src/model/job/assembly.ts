import { z } from 'zod';

/** How it is put together. */
export const assemblySchema = z
  .strictObject({
    start: z.string().optional().describe('Node to start from; absent: the supports, or the lowest node.'),
    closing: z
      .enum(['list', 'give'])
      .default('list')
      .describe('give: closing details go to the node system; list: they are only named.'),
    hand_mm: z.number().positive().default(80).describe('Diameter of a hand.'),
    driver_mm: z.tuple([z.number(), z.number()]).default([30, 150]).describe('Diameter and length of a driver.'),
    hold_min: z.number().nonnegative().default(30).describe('How long glue holds before a socket is a joint, minutes.'),
    door_mm: z
      .tuple([z.number(), z.number()])
      .default([800, 2000])
      .describe('Width and height of the narrowest door on the way.'),
    van_mm: z
      .tuple([z.number(), z.number(), z.number()])
      .default([2400, 1700, 1400])
      .describe('Length, width and height of the load space.'),
    lift_kg: z.number().positive().default(25).describe('What one person lifts.'),
    people: z.int().positive().default(2).describe('How many build it.'),
    springStrain: z.number().positive().default(0.004).describe('Largest strain of a strut that is sprung in.'),
    sag: z
      .number()
      .positive()
      .default(0.01)
      .describe('Sag of what stands that calls for a prop, as a share of the mean strut length.'),
    spares: z.number().nonnegative().default(0.05).describe('Spare parts as a share, rounded up by kind.'),
  })
  .prefault({})
  .describe('How it is put together.');
