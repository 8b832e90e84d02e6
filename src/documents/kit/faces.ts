import type { Fonts } from './fonts.js';

export type Face = 'regular' | 'bold' | 'fallback' | 'fallbackBold';

/** A face as the PDF library reads it; each paper takes its own subset of it. */
export interface ReadFace {
  hasGlyphForCodePoint(code: number): boolean;
}

/** What is found out about the faces, for all papers that embed them: reading them and laying text out takes half the time of a paper. */
export interface Faces {
  /** Read faces; a paper that finds none registers the bytes and leaves what it read here. */
  readonly read: Map<Face, ReadFace>;
  /** Widths in thousandths of the type size, by face and text. */
  readonly widths: Map<string, number>;
  /** Whether a face has a character, by its code point. */
  readonly covered: Readonly<Record<Face, Map<number, boolean>>>;
  /** Laid-out text, by face and text. */
  readonly runs: Map<string, unknown>;
}

const known = new WeakMap<Fonts, Faces>();

/** The faces of these bytes; the same for every paper that is handed the same object, so that nothing outlives a pack. */
export function facesOf(fonts: Fonts): Faces {
  let faces = known.get(fonts);
  if (!faces) {
    const covered = { regular: new Map(), bold: new Map(), fallback: new Map(), fallbackBold: new Map() };
    known.set(fonts, (faces = { read: new Map(), widths: new Map(), covered, runs: new Map() }));
  }
  return faces;
}

/** Most texts whose layout is kept: beyond it memory is worth more than the time. */
export const MOST_RUNS = 20_000;
