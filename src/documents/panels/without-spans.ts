import type { BulgedCorner } from '../../maths/polygon/arcs.js';
import type { DrawingLine } from '../kit/drawing.js';

type P = readonly [number, number];

/** A straight piece of a cut, mm. */
export interface Span {
  readonly a: P;
  readonly b: P;
}

/** Sides within this of one line are one cut, mm: a twentieth of a usual kerf. */
const SAME_LINE = 0.01;

/** The straight sides of a cut. */
export function straightSides({ corners, closed }: DrawingLine): Span[] {
  const n = corners.length;
  return corners.slice(0, closed ? n : n - 1).flatMap((c, i): Span[] => {
    const d = corners[(i + 1) % n]!;
    return c.bulge === 0 ? [{ a: [c.x, c.y], b: [d.x, d.y] }] : [];
  });
}

/**
 * A cut without what its straight sides have in common with the spans: itself where that is nothing, else open lines in its own sense. A
 * closed cut opens at a span alone, never at the corner that it happens to be written from.
 */
export function withoutSpans(line: DrawingLine, spans: readonly Span[]): DrawingLine[] {
  const { corners, closed } = line;
  const n = corners.length;
  const pieces: BulgedCorner[][] = [];
  let run: BulgedCorner[] = [];
  let cut = false;
  const end = (): void => {
    if (run.length > 1) pieces.push(run);
    run = [];
  };
  for (let i = 0; i < (closed ? n : n - 1); i++) {
    const [c, d] = [corners[i]!, corners[(i + 1) % n]!];
    if (c.bulge !== 0) {
      if (run.length === 0) run.push(c);
      else run[run.length - 1] = { ...run.at(-1)!, bulge: c.bulge };
      run.push({ ...d, bulge: 0 });
      continue;
    }
    const left = leftOver([c.x, c.y], [d.x, d.y], spans);
    if (left.length !== 1 || left[0]![0] > 0 || left[0]![1] < 1) cut = true;
    for (const [s, t] of left) {
      if (s > 0) end();
      if (run.length === 0) run.push({ x: c.x + s * (d.x - c.x), y: c.y + s * (d.y - c.y), bulge: 0 });
      run.push({ x: c.x + t * (d.x - c.x), y: c.y + t * (d.y - c.y), bulge: 0 });
      if (t < 1) end();
    }
    if (left.length === 0) end();
  }
  const ends = run.at(-1);
  end();
  if (!cut) return [line];
  const [first, last] = [pieces[0], pieces.at(-1)];
  const home = corners[0]!;
  if (closed && first && last && first !== last && ends === last.at(-1) && isAt(first[0]!, home) && isAt(ends!, home)) {
    pieces.pop();
    pieces[0] = [...last.slice(0, -1), ...first];
  }
  return pieces.map((piece) => ({ corners: piece, closed: false }));
}

const isAt = (a: BulgedCorner, b: BulgedCorner): boolean => a.x === b.x && a.y === b.y;

/** Shares of the side from a to b that no span covers. */
function leftOver(a: P, b: P, spans: readonly Span[]): [number, number][] {
  const l = Math.hypot(b[0] - a[0], b[1] - a[1]);
  const [ux, uy] = [(b[0] - a[0]) / l, (b[1] - a[1]) / l];
  const place = (p: P): readonly [number, number] => [
    (p[0] - a[0]) * ux + (p[1] - a[1]) * uy,
    (p[1] - a[1]) * ux - (p[0] - a[0]) * uy,
  ];
  let left: [number, number][] = [[0, 1]];
  for (const other of spans) {
    const [[s, off], [t, off2]] = [place(other.a), place(other.b)];
    if (Math.abs(off) > SAME_LINE || Math.abs(off2) > SAME_LINE) continue;
    const [from, to] = [Math.min(s, t) / l, Math.max(s, t) / l];
    left = left.flatMap(([x, y]): [number, number][] => {
      if (to <= x || from >= y) return [[x, y]];
      const rest: [number, number][] = [];
      if (from > x + SAME_LINE / l) rest.push([x, from]);
      if (to < y - SAME_LINE / l) rest.push([to, y]);
      return rest;
    });
  }
  return left;
}
