import { z } from 'zod';

const detail = z.enum(['plain', 'drop-in', 'slide']);

/** Sections of the struts, the saw and the stock. */
export const strutsSchema = z
  .strictObject({
    section: z.string().default('beech-8').describe('Section of every strut that has none of its own.'),
    groups: z.record(z.string(), z.string()).default({}).describe('Section by group.'),
    rollFrom: z
      .union([
        z.enum(['faces', 'up']).describe('The faces beside the strut, or upright.'),
        z.tuple([z.number(), z.number(), z.number()]).describe('A direction in the truss’s axes.'),
      ])
      .default('faces')
      .describe(
        'Where the height of a rectangular section points: to the outside of the faces beside the strut, up, or along a direction [x, y, z]; a strut’s own roll turns it from there.',
      ),
    ends: z
      .record(
        z.string(),
        z.union([
          detail.describe('Only its closing detail.'),
          z.strictObject({
            detail: detail.optional().describe('How the strut gets in; absent: plain.'),
            joint: z
              .enum(['glued', 'pinned', 'seated', 'loose'])
              .optional()
              .describe('How this end passes its force; absent: as `nodes.joint`.'),
            hold: z
              .enum(['socket', 'spigot'])
              .optional()
              .describe(
                'A sleeve round the strut, or a spigot or plate in it; absent: as the node. Not in a drilled ball or cube.',
              ),
          }),
        ]),
      )
      .default({})
      .describe('What one strut end asks for, by "strut@node": plain, drop-in or slide, or that and more.'),
    pinDrill: z.boolean().default(false).describe('Whether strut ends are drilled for the cross pins before assembly.'),
    faceJoints: z
      .boolean()
      .default(false)
      .describe('Whether rectangular struts meet face to face without sockets: lists their mitre and bevel angles.'),
    shareStops: z
      .boolean()
      .default(false)
      .describe('Whether nearly equal cut lengths share one stop setting within the end float.'),
    sizes: z
      .array(z.string())
      .default([])
      .describe('Sections that `strutwright size` may choose from, lightest first decided by mass.'),
  })
  .prefault({})
  .describe('Sections of the struts.');

export const sawSchema = z
  .strictObject({
    step_mm: z.number().positive().default(0.5).describe('Lengths are cut to whole steps, rounded down.'),
    endFloat_mm: z.number().nonnegative().default(0.75).describe('Least play of a strut in each socket.'),
    kerf_mm: z.number().nonnegative().default(3).describe('Width of the cut.'),
    endTrim_mm: z
      .number()
      .nonnegative()
      .default(5)
      .describe('Trimmed off a factory end before the first piece, blade included.'),
    trimEnds: z
      .union([z.literal(0), z.literal(1), z.literal(2)])
      .default(1)
      .describe('How many ends of a new bar are trimmed.'),
    leastClamped_mm: z
      .number()
      .nonnegative()
      .default(150)
      .describe('Pieces shorter than this are clamped, never hand-held.'),
  })
  .prefault({})
  .describe('The saw.');

export const stockSchema = z
  .strictObject({
    bars: z
      .array(
        z.strictObject({
          section: z.string().describe('Name of a section, from the catalogue or `sections`.'),
          length_mm: z.number().positive().describe('Length of one bar, mm.'),
          price: z.number().positive().default(1).describe('Price of one bar.'),
          available: z.int().nonnegative().optional().describe('Absent: as many as needed.'),
          name: z.string().optional().describe('What the shop calls it; absent: section and length.'),
        }),
      )
      .default([])
      .describe('What can be bought. Absent for a section: bars of 1000 mm for dowels up to 12 mm, else 2000 mm.'),
    rack: z
      .array(
        z.strictObject({
          section: z.string().describe('Name of a section, from the catalogue or `sections`.'),
          length_mm: z.number().positive().describe('Length of one bar, mm.'),
          mark: z.string().optional().describe('Mark that stands on the offcut.'),
        }),
      )
      .default([])
      .describe('Offcuts in the rack, used first. The offcut list of an earlier pack can be pasted here.'),
    leastOffcut_mm: z.number().nonnegative().default(200).describe('Shorter remainders are waste.'),
    offcutValue: z
      .number()
      .min(0)
      .max(1)
      .default(0)
      .describe('Value of a kept offcut as a share of the price per length.'),
    currency: z.string().max(8).default('').describe('Printed beside prices.'),
  })
  .prefault({})
  .describe('What the struts are cut from.');
