import type { BulgedCorner } from '../../maths/polygon/arcs.js';

/** What a line of a machine file is for. */
export type LinePurpose = 'outside' | 'inside' | 'engrave' | 'keep';

/** A plane drawing at true size, mm, origin lower left, x right, y up: what both SVG and DXF are written from. */
export interface Drawing {
  readonly title: string;
  readonly width: number;
  readonly height: number;
  /** In the order of cutting. */
  readonly layers: readonly DrawingLayer[];
}

export interface DrawingLayer {
  readonly name: string;
  /** #rrggbb */
  readonly colour: string;
  readonly purpose: LinePurpose;
  /** In the order of cutting. */
  readonly lines: readonly DrawingLine[];
}

export interface DrawingLine {
  /** Bulge 0: straight; else the side to the next corner is an arc (see maths/polygon/arcs). */
  readonly corners: readonly BulgedCorner[];
  readonly closed: boolean;
}

/** A line of straight sides. */
export const straightLine = (points: readonly (readonly [number, number])[], closed: boolean): DrawingLine => ({
  corners: points.map(([x, y]) => ({ x, y, bulge: 0 })),
  closed,
});
