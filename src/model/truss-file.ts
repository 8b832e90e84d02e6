import { z } from 'zod';
import { LIMITS } from './limits.js';
import { MARK_PATTERN } from './marks.js';
import { LENGTH_UNITS } from './units.js';

/** The grammar is checked by `markProblem`, which says more than a pattern can; the pattern is for editors. */
const mark = (text: string) => z.string().meta({ pattern: MARK_PATTERN, description: text });
const triple = z.tuple([z.number(), z.number(), z.number()]);
const name = z.string().min(1);

const node = z.strictObject({
  id: mark('Mark of the node.'),
  at: triple.describe('x, y, z in `units`, z up.'),
});

const member = z.strictObject({
  id: mark('Mark of the strut.'),
  ends: z.tuple([z.string(), z.string()]).describe('Marks of the nodes at its ends: from, to.'),
  force: z.number().optional().describe('Axial force in N, tension positive.'),
  section: name.optional().describe("Overrides the job's section."),
  area_mm2: z.number().positive().optional().describe("Overrides the section's area in the analysis, mm²."),
  modulus_MPa: z.number().positive().optional().describe("Overrides the material's modulus in the analysis, MPa."),
  roll_deg: z.number().optional().describe('Turn of a rectangular section about the axis, degrees.'),
  group: name.optional().describe('Struts of a group share what the job says of the group.'),
});

const face = z.strictObject({
  id: mark('Mark of the face, and of its panel.'),
  nodes: z
    .array(z.string())
    .max(LIMITS.corners)
    .describe('Marks of the nodes round the face, in order, the first not repeated.'),
  panel: z.boolean().optional().describe('Whether a panel is made for it; absent: no.'),
  group: name.optional().describe('Faces of a group share what the job says of the group.'),
});

const cell = z.strictObject({
  id: mark('Mark of the cell; "outside" is the unbounded one.'),
  faces: z.array(z.string()).describe('Marks of the faces that close the cell.'),
});

const reciprocal = z.strictObject({
  newtonPerArea: z.number().positive().describe('N for one squared unit of this file of force face.'),
  vertices: z
    .array(
      z.strictObject({ cell: z.string().describe('Mark of its cell.'), at: triple.describe('x, y, z in `units`.') }),
    )
    .describe('The force diagram: one vertex a cell, in `units`.'),
});

const support = z.strictObject({
  node: z.string().describe('Mark of the node.'),
  fixed: z
    .string()
    .regex(/^[xyz]{1,3}$/)
    .describe('The directions that are held: any of x y z.'),
});

const load = z.strictObject({
  case: z.string().meta({ minLength: 1, maxLength: 40, description: 'Name of the load case.' }),
  node: z.string().describe('Mark of the node.'),
  force: triple.describe('N, in the axes of the truss.'),
});

/** The truss file, `strutwright-truss/1`, as it is written: lengths in its own unit, degrees, optional lists left out. */
export const trussFileSchema = z.strictObject({
  $schema: z.string().optional().describe('Where an editor finds the JSON Schema of this file.'),
  format: z.literal('strutwright-truss/1').describe('Names this file format and its version.'),
  units: z.enum(LENGTH_UNITS).describe('Unit of every length in this file.'),
  nodes: z.array(node).max(LIMITS.nodes).describe('Where struts meet.'),
  members: z.array(member).max(LIMITS.members).describe('The struts.'),
  faces: z.array(face).max(LIMITS.faces).optional().describe('Plane loops of nodes; a panel may be made for each.'),
  cells: z
    .array(cell)
    .max(LIMITS.faces)
    .optional()
    .describe('Closed by faces: what the force diagram has its vertices for.'),
  reciprocal: reciprocal.optional().describe('A force diagram: the area of its faces is force.'),
  supports: z.array(support).optional().describe('Nodes that are held, and how.'),
  loads: z.array(load).optional().describe('Loads on nodes, by case; "given" is what the given forces balance.'),
});

export type TrussFile = Readonly<z.infer<typeof trussFileSchema>>;
