import type { Mat4 } from '../maths/mat4.js';
import type { Finding } from './finding.js';

/** One closed solid as it is printed: in print orientation, on z = 0, its box's lower corner at the origin, mm. */
export interface ShapedPiece {
  /** Empty for a hub of one piece; else the piece's name, as in MARK.PIECE.stl. */
  readonly piece: string;
  /** x, y, z a vertex; no two vertices are equal. */
  readonly positions: Float32Array;
  /** Three vertices a triangle, anticlockwise seen from outside. */
  readonly triangles: Uint32Array;
  /** mm³ */
  readonly volume: number;
  /** Size along x, y, z, mm. */
  readonly box: readonly [number, number, number];
  /** From the piece's own mm to the truss's axes in mm; a rotation and a move. */
  readonly placement: Mat4;
  /** Area that lies on the bed, mm². */
  readonly contact: number;
  /** Share of the surface steeper than 45° from upright that looks down and does not lie on the bed. */
  readonly overhang: number;
}

/** The section of a hub that is least for what it must pass on. */
export interface WeakestSection {
  /** The strut that it lies square to. */
  readonly strut: string;
  /** Between that strut's root and its stop, or through the middle of the body. */
  readonly where: 'root' | 'core';
  /** From the node along the strut, mm. */
  readonly distance: number;
  /** Half-width of the square about the strut's line (in the core: about the body's middle) that is counted, mm. */
  readonly within: number;
  /** mm², measured on the mesh. */
  readonly area: number;
  /** The sleeve's own section, or of the core the largest sleeve's, mm². */
  readonly needed: number;
}

/** A hub's solids and what was found wrong while they were made; no pieces where none could be made. */
export interface ShapedHub {
  readonly mark: string;
  readonly pieces: readonly ShapedPiece[];
  readonly findings: readonly Finding[];
  /** null: not measured; absent where there are no pieces. */
  readonly weakest?: WeakestSection | null;
}
