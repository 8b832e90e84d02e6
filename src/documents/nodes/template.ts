import { writeFitted } from '../kit/fit-text.js';
import type { Point } from '../kit/geometry2.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import type { Pen } from '../kit/pen.js';

/** One template at full size: its box, mm, with the point that it is drawn from in the box's axes. */
export interface Template {
  readonly width: number;
  readonly height: number;
  /** What is drawn instead where it is larger than the sheet. */
  readonly parts?: readonly Template[];
  draw(pen: Pen, x: number, y: number): void;
}

/** What stays white round a template, mm. */
export const ROUND = 5;
/** Room for the title over a template and the line under it, mm. */
export const WORDS = { over: 7, under: 9 } as const;

export interface Bounds {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
}

/** The least box round points with a margin, no narrower than its words. */
export function boxRound(points: readonly Point[], margin: number): Bounds {
  const [xs, ys] = [points.map((p) => p[0]), points.map((p) => p[1])];
  const [left, top] = [Math.min(...xs) - margin, Math.min(...ys) - margin];
  return {
    left,
    top,
    width: Math.max(NARROWEST, Math.max(...xs) + margin - left),
    height: Math.max(...ys) + margin - top,
  };
}

const NARROWEST = 56;
export const sizeOf = ({ width, height }: Bounds): { width: number; height: number } => ({
  width: width + 4,
  height: height + WORDS.over + WORDS.under,
});

export function title(pen: Pen, mark: string, words: string, x: number, y: number, { width }: Bounds): void {
  const wide = pen.text(mark, x, y + 5.5, { size: SIZE.head, bold: true });
  writeFitted(pen, words, x + wide + 2.5, y + 5.5, width - wide - 3, { size: SIZE.note, colour: INK.grey }, 5);
}

export function note(pen: Pen, words: string, x: number, y: number, { width, height }: Bounds): void {
  writeFitted(pen, words, x, y + WORDS.over + height + 3, width, { size: SIZE.note }, 5);
}

/** A hole with the cross of its middle. */
export function drawCentre(pen: Pen, x: number, y: number, radius: number): void {
  const arm = Math.max(radius + 1.5, 2.5);
  if (radius > 0) pen.circle(x, y, radius, { width: LINE.thin });
  pen.line([x - arm, y], [x + arm, y], { width: LINE.hair });
  pen.line([x, y - arm], [x, y + arm], { width: LINE.hair });
}
