import { z } from 'zod';

/** Node connectors: system, process and shape. */
export const nodesSchema = z
  .strictObject({
    system: z
      .enum(['socket', 'spigot', 'drilled-ball', 'drilled-cube'])
      .default('socket')
      .describe('The node system of every node that names none.'),
    systems: z
      .record(z.string(), z.enum(['socket', 'spigot', 'drilled-ball', 'drilled-cube', 'foot', 'clamp']))
      .default({})
      .describe('Node system by node mark.'),
    process: z.enum(['filament', 'powder', 'resin']).default('filament').describe('How hubs are printed.'),
    material: z.string().default('PETG-print').describe('What hubs are printed from.'),
    clearance_mm: z
      .number()
      .nonnegative()
      .optional()
      .describe('Diametral clearance over the largest measured rod; absent: by process and diameter.'),
    clearances: z
      .record(z.string(), z.number().nonnegative())
      .default({})
      .describe('Diametral clearance by section, as its own fit gauge gave it; counts as measured.'),
    allowance: z
      .strictObject({
        upright_mm: z
          .number()
          .nonnegative()
          .optional()
          .describe('Where the bore stands upright; absent: 0.2 of filament, else 0.'),
        lying_mm: z.number().nonnegative().default(0).describe('Where the bore lies level.'),
      })
      .prefault({})
      .describe('What a bore is drawn wider, since it prints narrower; between the two by the square of the cosine.'),
    clearanceMeasured: z
      .boolean()
      .default(false)
      .describe('true once the fit gauge has been printed and its value entered in `clearance_mm`.'),
    wall_mm: z
      .number()
      .positive()
      .optional()
      .describe('Wall of a sleeve; absent: the good wall of the process, at least a quarter of the rod.'),
    gap_mm: z.number().nonnegative().optional().describe('Least web between two bars at their ends; absent: the wall.'),
    depthFactor: z.number().positive().default(1.75).describe('Socket depth over rod diameter.'),
    depth_mm: z.number().positive().optional().describe('Socket depth; overrides the factor.'),
    setbacks: z
      .enum(['least', 'equal-at-node', 'equal'])
      .default('least')
      .describe('Whether setbacks are the least, equal at a node, or equal everywhere.'),
    joint: z
      .enum(['glued', 'pinned', 'seated', 'loose'])
      .default('glued')
      .describe('How a strut end passes force into its socket.'),
    pin_mm: z.number().nonnegative().default(2).describe('Diameter of the cross pin of a pinned joint.'),
    vent_mm: z
      .number()
      .nonnegative()
      .default(1.2)
      .describe('Diameter of the vent at the socket floor, for glue and air; 0: none.'),
    drain_mm: z
      .number()
      .nonnegative()
      .optional()
      .describe(
        'With powder: diameter of the hole at a socket floor that loose powder leaves by, in place of a narrower vent; absent: 2, at most half the bore; 0: the vent alone.',
      ),
    chamfer_mm: z
      .number()
      .nonnegative()
      .default(0.5)
      .describe('Chamfer at socket mouths and bed edges, against the squeezed first layer.'),
    mergeBelow_deg: z
      .number()
      .nonnegative()
      .default(20)
      .describe('Sleeves nearer than this are merged, their bores kept apart.'),
    leastAngle_deg: z.number().positive().default(12).describe('Bars nearer than this cannot be made.'),
    marks: z.boolean().default(true).describe('Whether marks are engraved.'),
    markDepth_mm: z
      .number()
      .positive()
      .optional()
      .describe('Depth of engraved letters; absent: what the way of printing allows.'),
    markHeight_mm: z
      .number()
      .positive()
      .optional()
      .describe('Height of engraved capitals; absent: what the way of printing allows.'),
    bondStrength_MPa: z.number().positive().optional().describe('Shear strength of the glue line from your own test.'),
    foot: z
      .strictObject({
        plate_mm: z.number().positive().default(60).describe('Diameter of the base plate.'),
        thickness_mm: z.number().positive().default(6).describe('Thickness of the base plate.'),
        anchors: z.int().nonnegative().default(3).describe('Holes for anchors in the base plate.'),
        anchor_mm: z.number().positive().default(5).describe('Diameter of an anchor.'),
        levelling_mm: z.number().nonnegative().default(0).describe('Diameter of a levelling screw; 0: none.'),
      })
      .prefault({})
      .describe('The base plate of the system `foot`.'),
    ball: z
      .strictObject({
        diameter_mm: z.number().positive().optional().describe('Absent: the least that holds every bore.'),
        material: z.string().default('beech-dowel').describe('What balls are turned from.'),
      })
      .prefault({})
      .describe('The ball of the system `drilled-ball`.'),
    cube: z
      .strictObject({
        edge_mm: z.number().positive().optional().describe('Absent: the least that takes every bore on one face.'),
        material: z.string().default('beech-dowel').describe('What cubes are sawn from.'),
      })
      .prefault({})
      .describe('The cube of the system `drilled-cube`, its faces square to the axes of the truss.'),
    orientation: z
      .strictObject({
        overhang: z.number().nonnegative().default(1).describe('Weight of overhangs.'),
        height: z.number().nonnegative().default(0.3).describe('Weight of height.'),
        tension: z.number().nonnegative().default(1).describe('Weight of tension across layers.'),
      })
      .prefault({})
      .describe('Weights of the print orientation.'),
  })
  .prefault({})
  .describe('Node connectors.');

export const printersSchema = z
  .array(
    z.strictObject({
      name: z.string().default('printer').describe('What the printer is called on the sheets.'),
      process: z
        .enum(['filament', 'powder', 'resin'])
        .optional()
        .describe('How it prints; absent: as `nodes.process`. Hubs go to printers of their own process alone.'),
      bed: z.enum(['rectangle', 'circle']).default('rectangle').describe('Shape of the bed.'),
      width_mm: z.number().positive().default(210).describe('Usable width, or diameter of a round bed.'),
      depth_mm: z.number().positive().default(210).describe('Usable depth.'),
      height_mm: z.number().positive().default(240).describe('Usable height.'),
      margin_mm: z.number().nonnegative().default(2).describe('Kept free along the edge of the bed.'),
      spacing_mm: z.number().nonnegative().default(4).describe('Between two pieces on the bed.'),
      layer_mm: z.number().positive().default(0.2).describe('Height of one layer.'),
      flow_mm3_per_s: z.number().positive().default(8).describe('Plastic laid per second, averaged.'),
      layerChange_s: z
        .number()
        .nonnegative()
        .default(4)
        .describe('Time between two layers, for the estimate of the time.'),
    }),
  )
  .min(1)
  .prefault([{}])
  .describe('Printers that beds are filled for.');
