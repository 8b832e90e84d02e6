import { z } from 'zod';

/** A layer of the machine files. */
const layer = {
  name: z.string().describe('Name of the layer.'),
  colour: z.string().describe('Colour of its lines, as #rrggbb.'),
};

const seating = z.enum(['between', 'over', 'under']);

/** Panels, sheets and the machine that cuts them. */
export const panelsSchema = z
  .strictObject({
    material: z.string().default('acrylic-cast').describe('Name of a material, from the catalogue or `materials`.'),
    thickness_mm: z.number().positive().default(3).describe('Thickness of the sheet, mm.'),
    seating: seating.default('between').describe('between the struts, over them (outside) or under them.'),
    groups: z
      .record(
        z.string(),
        z.strictObject({
          seating: seating.optional().describe('As above.'),
          thickness_mm: z.number().positive().optional().describe('Thickness of the sheet, mm.'),
          material: z.string().optional().describe('As above.'),
        }),
      )
      .default({})
      .describe('By face group.'),
    faces: z
      .record(
        z.string(),
        z.strictObject({
          seating: seating.optional().describe('As above.'),
          thickness_mm: z.number().positive().optional().describe('Thickness of the sheet, mm.'),
          material: z.string().optional().describe('As above.'),
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
        pitch_mm: z.number().positive().default(150).describe('Largest distance between two holes.'),
        edge_mm: z.number().positive().default(12).describe('Distance of hole centres from the edge.'),
        oversize_mm: z.number().nonnegative().optional().describe('Added outdoors; absent: from the movement.'),
      })
      .prefault({})
      .describe('Holes that panels are tied or screwed by.'),
    notFlat: z
      .enum(['flag', 'split', 'fold', 'bend'])
      .default('flag')
      .describe('What is done with a face out of flat.'),
    bendStress_MPa: z.number().positive().default(5).describe('Largest sustained stress of a sheet bent cold.'),
    mark: z.boolean().default(true).describe('Whether marks are engraved.'),
    markHeight_mm: z.number().positive().default(6).describe('Height of engraved capitals.'),
  })
  .prefault({})
  .describe('The panels.');

export const sheetsSchema = z
  .array(
    z.strictObject({
      name: z.string().default('sheet').describe('What the shop calls it.'),
      material: z.string().optional().describe('Absent: serves every panel material.'),
      thickness_mm: z.number().positive().optional().describe('Thickness of the sheet, mm.'),
      width_mm: z.number().positive().default(600).describe('Width of the sheet.'),
      height_mm: z.number().positive().default(400).describe('Height of the sheet.'),
      available: z.int().nonnegative().optional().describe('How many there are; absent: as many as needed.'),
      price: z.number().positive().default(1).describe('Price of one sheet.'),
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
    kind: z.enum(['laser', 'router', 'saw']).default('laser').describe('What cuts: decides hazards and corners.'),
    kerf_mm: z.number().nonnegative().default(0.2).describe('Full width of the cut, from the kerf comb.'),
    kerfMeasured: z.boolean().default(false).describe('true once the kerf comb has been cut and its value entered.'),
    compensate: z
      .enum(['here', 'shop'])
      .default('here')
      .describe('Who offsets by half the kerf: exactly one of the two.'),
    spacing_mm: z.number().nonnegative().default(2).describe('Least distance between two panels on a sheet.'),
    margin_mm: z.number().nonnegative().default(5).describe('Kept free along the edge of the sheet.'),
    tool_mm: z.number().positive().default(3).describe('Diameter of a router tool.'),
    rotations: z
      .enum(['free', 'quarter', 'half', 'fixed'])
      .default('free')
      .describe('How panels may turn on the sheet (grain, film).'),
    sharedCuts: z.boolean().default(false).describe('Whether neighbours may share one straight cut.'),
    tabs_mm: z.number().nonnegative().default(0).describe('Width of holding tabs; 0: none.'),
    leadIn_mm: z.number().nonnegative().default(0).describe('Length of the run into a cut from the waste; 0: none.'),
    layers: z
      .strictObject({
        outside: z
          .strictObject(layer)
          .default({ name: 'CUT-OUTSIDE', colour: '#b35806' })
          .describe('Cuts round the panels.'),
        inside: z
          .strictObject(layer)
          .default({ name: 'CUT-INSIDE', colour: '#542788' })
          .describe('Cuts inside the panels: they come first.'),
        engrave: z
          .strictObject(layer)
          .default({ name: 'ENGRAVE', colour: '#1b7837' })
          .describe('What is only engraved.'),
        keep: z
          .strictObject(layer)
          .default({ name: 'DO-NOT-CUT', colour: '#777777' })
          .describe('Names and the check square: never cut.'),
      })
      .prefault({})
      .describe('Layers of the machine files: every shop has its own.'),
    effort: z.number().positive().default(1).describe('Evaluations of the nesting search, as a multiple of the usual.'),
  })
  .prefault({})
  .describe('The machine that cuts the panels.');
