import type { Box } from './geometry2.js';

export interface TextStyle {
  /** Type size in pt; 9 where absent. */
  readonly size?: number;
  readonly bold?: boolean;
  readonly colour?: string;
  /** Which point of the text lies at x. */
  readonly align?: 'left' | 'centre' | 'right';
}

export interface LineStyle {
  /** mm */
  readonly width?: number;
  readonly colour?: string;
  /** Lengths of strokes and gaps, mm. */
  readonly dash?: readonly [number, number];
  readonly cap?: 'butt' | 'round';
}

/** A text as placed: what tests hold against each other. */
export interface PlacedText extends Box {
  readonly sheet: number;
  readonly text: string;
}
