import type { Vec3 } from '../maths/vec3.js';

/**
 * The reciprocal figure of a truss: one vertex a cell (of a plane truss: a region), one polygon a strut, one closed
 * polyhedron a node (of a plane truss: one closed polygon a node). Its lengths are the diagram's own.
 */
export interface ForceDiagram {
  /** `space`: a force is an area; `plane`: a force is the length of the segment between two vertices. */
  readonly kind: 'space' | 'plane';
  /** Where the vertices come from: the truss file, the functions over the cells, or a lifting of a plane truss. */
  readonly source: 'file' | 'found' | 'lifting';
  /** +1 or -1: what turns a positive area into tension or compression. */
  readonly sign: 1 | -1;
  /** N for one squared unit of the diagram (`space`) or for one unit (`plane`). */
  readonly newtonPerUnit: number;
  readonly vertices: readonly { readonly cell: string; readonly at: Vec3 }[];
  readonly struts: readonly StrutPolygon[];
  readonly nodes: readonly NodePolyhedron[];
}

export interface StrutPolygon {
  readonly mark: string;
  /** Indices into `vertices`: the cells round the strut, anticlockwise about it looking from its "to" end to its "from" end. */
  readonly loop: readonly number[];
  /** Area vector of the loop in N (sign not applied); of a plane truss: the segment, from right of the strut to left. */
  readonly area: Vec3;
  /** N, tension positive. */
  readonly force: number;
  /** Between the strut and the polygon's normal (of a plane truss: between the strut and the segment's normal), rad. */
  readonly angle: number;
}

export interface NodePolyhedron {
  readonly mark: string;
  /** Faces of the polyhedron: a strut's polygon each, or a load's; loops anticlockwise seen from outside the node. */
  readonly faces: readonly { readonly strut: string | null; readonly loop: readonly number[]; readonly area: Vec3 }[];
  /** Sum of the area vectors, N: nought for a closed polyhedron (Minkowski). */
  readonly closure: Vec3;
  /** Sum of the forces along the struts and the node's load or reaction, N: nought in equilibrium. */
  readonly residual: Vec3;
}
