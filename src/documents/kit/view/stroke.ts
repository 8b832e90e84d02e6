import type { Point } from '../geometry2.js';
import { INK, LINE } from '../ink.js';
import type { Pen } from '../pen.js';

/** How one strut is drawn. */
export type Stroke =
  | { readonly kind: 'tension' | 'compression'; readonly width: number }
  /** No force, or none known: thin grey. */
  | { readonly kind: 'none' }
  /** Beside the matter of the sheet. */
  | { readonly kind: 'faint' }
  /** Strong black: new, or the sheet's own matter. */
  | { readonly kind: 'plain'; readonly width: number }
  /** A grey between 0 (white) and 1 (black). */
  | { readonly kind: 'ramp'; readonly width: number; readonly share: number };

/** Widest line of a force, mm; widths go with the square root of the force, so that areas compare as forces do. */
export const WIDEST = 2.2;
/** A double line needs this much to show its core. */
const LEAST_DOUBLE = 0.75;
const LEAST_SOLID = 0.35;

/** Stroke of a force in N beside the largest one; `zero` in N counts as none. */
export function strokeOfForce(force: number | null, largest: number, zero: number): Stroke {
  if (force === null || Math.abs(force) <= zero || largest <= 0) return { kind: 'none' };
  const width = WIDEST * Math.sqrt(Math.abs(force) / largest);
  return force > 0
    ? { kind: 'tension', width: Math.max(LEAST_DOUBLE, width) }
    : { kind: 'compression', width: Math.max(LEAST_SOLID, width) };
}

export function strokeWidth(stroke: Stroke): number {
  switch (stroke.kind) {
    case 'none':
      return LINE.thin;
    case 'faint':
      return LINE.hair;
    default:
      return stroke.width;
  }
}

/** Draws a strut: tension as a double line with a white core, compression solid. */
export function drawStroke(pen: Pen, from: Point, to: Point, stroke: Stroke): void {
  const width = strokeWidth(stroke);
  pen.line(from, to, { width, colour: colourOf(stroke) });
  if (stroke.kind === 'tension') pen.line(from, to, { width: width * 0.42, colour: INK.white });
}

function colourOf(stroke: Stroke): string {
  switch (stroke.kind) {
    case 'tension':
      return INK.tension;
    case 'compression':
      return INK.compression;
    case 'none':
      return INK.grey;
    case 'faint':
      return INK.faint;
    case 'plain':
      return INK.black;
    case 'ramp':
      return grey(stroke.share);
  }
}

/** The grey of a share: 0 is the lightest that still shows on white paper, 1 black. */
export function grey(share: number): string {
  const level = Math.round(215 * (1 - Math.min(1, Math.max(0, share))));
  const hex = level.toString(16).padStart(2, '0');
  return `#${hex}${hex}${hex}`;
}
