import { clearanceAt } from '../../maths/polygon/clearance.js';
import { poleOfInaccessibility } from '../../maths/polygon/pole-of-inaccessibility.js';
import { type Ring, toPoints, toRing } from '../../maths/polygon/ring.js';
import { layOutText, strokeText } from '../../maths/stroke-text.js';
import type { Point2, Polyline2 } from '../../model/parts.js';

/** What is written on a panel. */
export interface PanelWords {
  readonly mark: string;
  /** Strut along the outline's edge that `edge` names, written along it. */
  readonly strut: { readonly mark: string; readonly from: Point2; readonly to: Point2; readonly inset: number } | null;
  /** Direction in the frame in which the truss's z rises most; null: the panel lies level. */
  readonly up: Point2 | null;
}

export interface Engraving {
  readonly strokes: readonly Polyline2[];
  /** Height of the capitals of the mark, mm; 0: no room for any. */
  readonly height: number;
}

/** Letters lower than this cannot be read once cut, mm: common practice, no source. */
export const LEAST_LETTERS = 3;
/** Lines of the block: mark, rule, OUT. Height of the block over the height of the capitals. */
const BLOCK_LINES = 2.9;

/**
 * Single strokes on the outer face: in the widest room inside the outline the mark, underlined, OUT under it (this side
 * faces out) with an arrow that points up; along one edge the mark of its strut. Letters shrink to fit, down to 3 mm.
 */
export function engrave(outline: Ring, holes: readonly Ring[], words: PanelWords, height: number): Engraving {
  // Written upright: the frame is turned until the truss's up is the letters' up, and the strokes are turned back.
  const [ux, uy] = words.up ?? [0, 1];
  const turned = ([x, y]: Point2): Point2 => [x * uy - y * ux, x * ux + y * uy];
  const back = ([x, y]: Point2): Point2 => [x * uy + y * ux, y * uy - x * ux];
  const upright = writeUpright(
    [outline, ...holes].map((r) => toRing(toPoints(r).map(turned))),
    {
      mark: words.mark,
      up: words.up && [0, 1],
      strut: words.strut && { ...words.strut, from: turned(words.strut.from), to: turned(words.strut.to) },
    },
    height,
  );
  return { height: upright.height, strokes: upright.strokes.map((line) => line.map(back)) };
}

function writeUpright(rings: readonly Ring[], words: PanelWords, height: number): Engraving {
  for (let h = height; h >= LEAST_LETTERS - 1e-9; h = h > LEAST_LETTERS ? Math.max(LEAST_LETTERS, h * 0.85) : 0) {
    if (h === 0) break;
    const block = wordsBlock(words, h);
    const [w, tall] = block.size;
    // Holes stand along the edges: mostly the widest room of the outline alone is clear of them, and found much faster.
    const placeIn = (room: readonly Ring[]): Polyline2[] | null => {
      const [x, y] = poleOfInaccessibility(room, 0.1 * h, Math.max(0.2, w / tall));
      const strokes = block.strokes.map((line) => line.map(([px, py]): Point2 => [px + x - w / 2, py + y - tall / 2]));
      return inside(strokes, rings, h * MARGIN_SHARE) ? strokes : null;
    };
    const placed = placeIn(rings.slice(0, 1)) ?? placeIn(rings);
    if (!placed) continue;
    const strut = words.strut ? alongEdge(rings, words.strut, h, placed) : [];
    return { strokes: [...placed, ...strut], height: h };
  }
  return { strokes: [], height: 0 };
}

/** Strokes keep this share of the letter's height from every cut. */
const MARGIN_SHARE = 0.4;

const inside = (strokes: readonly Polyline2[], rings: readonly Ring[], clear: number): boolean =>
  strokes.every((line) => line.every(([x, y]) => clearanceAt(rings, x, y) >= clear));

/** Single-stroke letters with capitals `height` mm high, their left foot at 0,0. */
export function letters(text: string, height: number): { strokes: Point2[][]; width: number } {
  const strokes = strokeText(text).map((line) => line.map(([x, y]): Point2 => [x * height, y * height]));
  return { strokes, width: layOutText(text).width * height };
}

function wordsBlock(words: PanelWords, h: number): { strokes: Polyline2[]; size: [number, number] } {
  const mark = letters(words.mark, h);
  const small = 0.7 * h;
  const out = letters('OUT', small);
  const arrow = words.up ? arrowAlong(words.up, small) : [];
  const arrowRoom = words.up ? small * 1.6 : 0;
  const width = Math.max(mark.width, out.width + arrowRoom);
  const tall = h * (BLOCK_LINES - 0.5);
  const shift = (lines: readonly Polyline2[], dx: number, dy: number): Polyline2[] =>
    lines.map((line) => line.map(([x, y]): Point2 => [x + dx, y + dy]));
  const rule: Polyline2 = [
    [(width - mark.width) / 2, tall - 1.35 * h],
    [(width + mark.width) / 2, tall - 1.35 * h],
  ];
  const lower = (width - out.width - arrowRoom) / 2;
  return {
    strokes: [
      ...shift(mark.strokes, (width - mark.width) / 2, tall - h),
      rule,
      ...shift(out.strokes, lower, 0),
      ...shift(arrow, lower + out.width + small, small / 2),
    ],
    size: [width, tall],
  };
}

/** An arrow of length l through 0,0. */
function arrowAlong(up: Point2, l: number): Polyline2[] {
  const at = (along: number, across: number): Point2 => [
    up[0] * along - up[1] * across,
    up[1] * along + up[0] * across,
  ];
  return [
    [at(-l / 2, 0), at(l / 2, 0)],
    [at(l / 6, l / 4), at(l / 2, 0), at(l / 6, -l / 4)],
  ];
}

/** The strut's mark along its edge, never upside down, as near the edge's middle as there is room; else nothing. */
function alongEdge(
  rings: readonly Ring[],
  strut: NonNullable<PanelWords['strut']>,
  h: number,
  taken: readonly Polyline2[],
): Polyline2[] {
  const size = 0.7 * h;
  const text = letters(strut.mark, size);
  const [a, b] = [strut.from, strut.to];
  const l = Math.hypot(b[0] - a[0], b[1] - a[1]);
  const [ux, uy] = [(b[0] - a[0]) / l, (b[1] - a[1]) / l];
  const busy = taken.flat();
  for (const share of [0.5, 0.35, 0.65, 0.25, 0.75])
    for (const lift of [0.5, 1, 2]) {
      const start = share * l - text.width / 2;
      const d = strut.inset + size * lift;
      // Never upside down: along an edge that runs to the left the letters are turned about their middle.
      const placed = text.strokes.map((line) =>
        line.map(([tx, ty]): Point2 => {
          const [x, y] = ux < -1e-9 ? [text.width - tx, size - ty] : [tx, ty];
          return [a[0] + ux * (start + x) - uy * (d + y), a[1] + uy * (start + x) + ux * (d + y)];
        }),
      );
      const free = placed.flat().every((p) => busy.every((q) => Math.hypot(p[0] - q[0], p[1] - q[1]) > size));
      if (free && inside(placed, rings, size * MARGIN_SHARE)) return placed;
    }
  return [];
}
