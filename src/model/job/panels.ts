import { z } from 'zod';

const seating = z.enum(['between', 'over', 'under']);

/** Panels, sheets and the machine that cuts them. */
export const panelsSchema = z
  .strictObject({
    material: z.string().default('acrylic-cast'),
    thickness_mm: z.number().positive().default(3),
    seating: seating.default('between').describe('between the struts, over them (outside) or under them.'),
    groups: z
      .record(
        z.string(),
        z.strictObject({
          seating: seating.optional(),
          thickness_mm: z.number().positive().optional(),
          material: z.string().optional(),
        }),
      )
      .default({})
      .describe('By face group.'),
    faces: z
      .record(
        z.string(),
        z.strictObject({
          seating: seating.optional(),
          thickness_mm: z.number().positive().optional(),
          material: z.string().optional(),
        }),
      )
      .default({})
      .describe('By face mark.'),
    gap_mm: z.number().nonnegative().default(1).describe('Clearance from struts and hubs.'),
    movement_K: z
      .number()
      .nonnegative()
      .optional()
      .describe('Change of temperature that the gap must take; absent: 15 K indoors, 40 K outdoors.'),
    humidity: z
      .number()
      .nonnegative()
      .optional()
      .describe('Growth by humidity as a share; absent: 0 indoors, 0.004 outdoors.'),
    corner: z
      .enum(['straight', 'round', 'follow'])
      .default('straight')
      .describe('How a corner is cut clear of its hub.'),
    cornerRadius_mm: z.number().nonnegative().optional().describe('Radius at inside corners; absent: by material.'),
    edges: z.enum(['square', 'bevelled']).default('square').describe('Of panels over or under the struts.'),
    holdBy: z.enum(['channel', 'clips', 'ties', 'stand-offs', 'none']).default('ties').describe('What holds a panel.'),
    bite_mm: z.number().nonnegative().default(5).describe('How far the holding part reaches over the panel.'),
    fixingCapacity_N: z
      .number()
      .positive()
      .optional()
      .describe('What one tie, clip or stand-off holds, from your own test.'),
    holes: z
      .strictObject({
        diameter_mm: z.number().nonnegative().default(4).describe('0: no holes.'),
        pitch_mm: z.number().positive().default(150),
        edge_mm: z.number().positive().default(12).describe('Distance of hole centres from the edge.'),
        oversize_mm: z.number().nonnegative().optional().describe('Added outdoors; absent: from the movement.'),
      })
      .prefault({}),
    notFlat: z
      .enum(['flag', 'split', 'fold', 'bend'])
      .default('flag')
      .describe('What is done with a face out of flat.'),
    bendStress_MPa: z.number().positive().default(5).describe('Largest sustained stress of a sheet bent cold.'),
    mark: z.boolean().default(true).describe('Whether marks are engraved.'),
    markHeight_mm: z.number().positive().default(6),
  })
  .prefault({});

export const sheetsSchema = z
  .array(
    z.strictObject({
      name: z.string().default('sheet'),
      material: z.string().optional().describe('Absent: serves every panel material.'),
      thickness_mm: z.number().positive().optional(),
      width_mm: z.number().positive().default(600),
      height_mm: z.number().positive().default(400),
      available: z.int().nonnegative().optional(),
      price: z.number().positive().default(1),
      outline: z
        .array(z.tuple([z.number(), z.number()]))
        .min(3)
        .optional()
        .describe('Of an offcut, mm, inside width and height.'),
    }),
  )
  .min(1)
  .prefault([{}])
  .describe('Sheets that panels are cut from.');

export const cutterSchema = z
  .strictObject({
    kind: z.enum(['laser', 'router', 'saw']).default('laser'),
    kerf_mm: z.number().nonnegative().default(0.2).describe('Full width of the cut, from the kerf comb.'),
    kerfMeasured: z.boolean().default(false),
    compensate: z
      .enum(['here', 'shop'])
      .default('here')
      .describe('Who offsets by half the kerf: exactly one of the two.'),
    spacing_mm: z.number().nonnegative().default(2),
    margin_mm: z.number().nonnegative().default(5),
    tool_mm: z.number().positive().default(3).describe('Diameter of a router tool.'),
    rotations: z
      .enum(['free', 'quarter', 'half', 'fixed'])
      .default('free')
      .describe('How panels may turn on the sheet (grain, film).'),
    sharedCuts: z.boolean().default(false),
    tabs_mm: z.number().nonnegative().default(0).describe('Width of holding tabs; 0: none.'),
    leadIn_mm: z.number().nonnegative().default(0),
    layers: z
      .strictObject({
        outside: z
          .strictObject({ name: z.string(), colour: z.string() })
          .default({ name: 'CUT-OUTSIDE', colour: '#b35806' }),
        inside: z
          .strictObject({ name: z.string(), colour: z.string() })
          .default({ name: 'CUT-INSIDE', colour: '#542788' }),
        engrave: z
          .strictObject({ name: z.string(), colour: z.string() })
          .default({ name: 'ENGRAVE', colour: '#1b7837' }),
        keep: z
          .strictObject({ name: z.string(), colour: z.string() })
          .default({ name: 'DO-NOT-CUT', colour: '#777777' }),
      })
      .prefault({}),
    effort: z.number().positive().default(1).describe('Evaluations of the nesting search, as a multiple of the usual.'),
  })
  .prefault({});
