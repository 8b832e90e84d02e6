// The text part alone: the whole package takes ten times as long to load.
import jscadText from '@jscad/modeling/src/text/index.js';

/** A stroke as points, in units of the capital height; x right, y up from the baseline. */
export type Stroke = readonly (readonly [number, number])[];

export interface Glyph {
  /** Ink from x = 0 to this width. */
  readonly width: number;
  /** Lowest and highest ink; the baseline is 0 and a capital's top 1. */
  readonly low: number;
  readonly high: number;
  readonly strokes: readonly Stroke[];
}

/** The font draws capitals 1.5 times the height it is asked for. */
const CAPITAL = 1.5;

/** Strokes that tell alike characters apart: a bar through 0 and Z, serifs on I and 1, a line under 6 and 9. */
const EXTRA: Readonly<Record<string, (width: number) => readonly Stroke[]>> = {
  '0': (w) => [
    [
      [0.2 * w, 0.12],
      [0.8 * w, 0.88],
    ],
  ],
  Z: (w) => [
    [
      [0.25 * w, 0.5],
      [0.75 * w, 0.5],
    ],
  ],
  I: (w) => [
    [
      [w / 2 - 0.2, 1],
      [w / 2 + 0.2, 1],
    ],
    [
      [w / 2 - 0.2, 0],
      [w / 2 + 0.2, 0],
    ],
  ],
  '1': (w) => [
    [
      [w - 0.22, 0],
      [w + 0.22, 0],
    ],
  ],
  '6': (w) => [
    [
      [0, -0.3],
      [w, -0.3],
    ],
  ],
  '9': (w) => [
    [
      [0, -0.3],
      [w, -0.3],
    ],
  ],
};

const cache = new Map<string, Glyph>();

/** The strokes of one character in a single-stroke font; ink starts at x = 0. A blank has no strokes. */
export function strokeGlyph(character: string): Glyph {
  let glyph = cache.get(character);
  if (!glyph) {
    glyph = makeGlyph(character);
    cache.set(character, glyph);
  }
  return glyph;
}

function makeGlyph(character: string): Glyph {
  const { segments } = jscadText.vectorChar({ height: 1 / CAPITAL, xOffset: 0, yOffset: 0 }, character);
  const raw = (segments as [number, number][][]).filter((s) => s.length > 1);
  if (raw.length === 0) return { width: BLANK, low: 0, high: 1, strokes: [] };
  const left = Math.min(...raw.flat().map((p) => p[0]));
  const width = Math.max(...raw.flat().map((p) => p[0])) - left;
  const moved: Stroke[] = raw.map((s) => s.map((p): [number, number] => [p[0] - left, p[1]]));
  const all = [...moved, ...(EXTRA[character]?.(width) ?? [])];
  const low = Math.min(0, ...all.flat().map((p) => p[0]));
  const high = Math.max(...all.flat().map((p) => p[0]));
  const heights = all.flat().map((p) => p[1]);
  return {
    width: high - low,
    low: Math.min(...heights),
    high: Math.max(...heights),
    strokes: all.map((s) => s.map((p): [number, number] => [p[0] - low, p[1]])),
  };
}

const BLANK = 0.4;
/** Clear space between the ink of two characters. */
const SPACING = 0.28;

/** A line of text as placed glyphs: the character and where its ink starts, in capital heights; total width of ink. */
export function layOutText(
  text: string,
  spacing: number = SPACING,
): { readonly width: number; readonly places: readonly { readonly character: string; readonly x: number }[] } {
  let x = 0;
  const places = [...text].map((character) => {
    const place = { character, x };
    x += strokeGlyph(character).width + spacing;
    return place;
  });
  return { width: Math.max(0, x - spacing), places };
}

/** The strokes of a line of text, in capital heights. */
export const strokeText = (text: string): Stroke[] =>
  layOutText(text).places.flatMap(({ character, x }) =>
    strokeGlyph(character).strokes.map((s) => s.map((p): [number, number] => [p[0] + x, p[1]])),
  );
