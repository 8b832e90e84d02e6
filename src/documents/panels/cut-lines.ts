import type { BulgedCorner } from '../../maths/polygon/arcs.js';
import type { DrawingLine } from '../kit/drawing.js';

type P = readonly [number, number];

/** Straight sides at least this many tab widths long carry a tab. */
const SIDE_OVER_TAB = 6;
/** Tabs of one panel at most: more hold no better and are more to file. */
const MOST_TABS = 4;

/**
 * A closed cut left open at holding tabs of `width` mm: one in the middle of each of its longest straight sides, up to
 * four. Sides too short for one keep their cut. Without a side long enough the cut stays closed.
 */
export function withTabs(line: DrawingLine, width: number): DrawingLine[] {
  const { corners } = line;
  const n = corners.length;
  const length = (i: number): number =>
    Math.hypot(corners[(i + 1) % n]!.x - corners[i]!.x, corners[(i + 1) % n]!.y - corners[i]!.y);
  const sides = corners
    .map((_, i) => i)
    .filter((i) => corners[i]!.bulge === 0 && length(i) >= SIDE_OVER_TAB * width)
    .sort((a, b) => length(b) - length(a) || a - b)
    .slice(0, MOST_TABS)
    .sort((a, b) => a - b);
  if (sides.length === 0) return [line];
  const on = (i: number, s: number): BulgedCorner => {
    const [a, b] = [corners[i]!, corners[(i + 1) % n]!];
    const t = s / length(i);
    return { x: a.x + t * (b.x - a.x), y: a.y + t * (b.y - a.y), bulge: 0 };
  };
  return sides.map((side, k) => {
    const next = sides[(k + 1) % sides.length]!;
    const out: BulgedCorner[] = [on(side, length(side) / 2 + width / 2)];
    for (let i = (side + 1) % n; ; i = (i + 1) % n) {
      out.push(corners[i]!);
      if (i === next) break;
    }
    out.push(on(next, length(next) / 2 - width / 2));
    return { corners: out, closed: false };
  });
}

/**
 * A closed cut begun in the waste: it starts `lead` mm off the middle of its longest straight side, comes in at 45°, and
 * ends where it met the outline. `side` says where the waste is of a cut that runs anticlockwise.
 */
export function withLeadIn(line: DrawingLine, lead: number, side: 'outside' | 'inside'): DrawingLine {
  const { corners } = line;
  const n = corners.length;
  let best = -1;
  let longest = 0;
  corners.forEach((c, i) => {
    const d = Math.hypot(corners[(i + 1) % n]!.x - c.x, corners[(i + 1) % n]!.y - c.y);
    if (c.bulge === 0 && d > longest) {
      longest = d;
      best = i;
    }
  });
  if (best < 0) {
    // All arcs, as a round hole: straight in from its middle where the waste lies inside, else left as it is.
    if (side === 'outside') return line;
    const middle = corners.reduce<P>((m, c) => [m[0] + c.x / n, m[1] + c.y / n], [0, 0]);
    return {
      closed: false,
      corners: [{ x: middle[0], y: middle[1], bulge: 0 }, ...corners, { ...corners[0]!, bulge: 0 }],
    };
  }
  const [a, b] = [corners[best]!, corners[(best + 1) % n]!];
  const [ux, uy] = [(b.x - a.x) / longest, (b.y - a.y) / longest];
  const start: BulgedCorner = { x: (a.x + b.x) / 2, y: (a.y + b.y) / 2, bulge: 0 };
  const out = side === 'outside' ? 1 : -1;
  const s = lead * Math.SQRT1_2;
  const from: BulgedCorner = { x: start.x - s * ux + s * uy * out, y: start.y - s * uy - s * ux * out, bulge: 0 };
  const round = Array.from({ length: n }, (_, k) => corners[(best + 1 + k) % n]!);
  return { closed: false, corners: [from, start, ...round, start] };
}

/** Sides within this of one line are one cut, mm: a twentieth of a usual kerf. */
const SAME_LINE = 0.01;

/**
 * Cuts with every straight part that two of them share drawn once: closed outlines whose sides nobody shares stay
 * closed, the others come apart into open lines. Panels must stand one kerf apart for their paths to meet.
 */
export function sharedCuts(lines: readonly DrawingLine[]): DrawingLine[] {
  const drawn: { a: P; b: P }[] = [];
  return lines.flatMap((line) => {
    const n = line.corners.length;
    const pieces: DrawingLine[] = [];
    let run: BulgedCorner[] = [];
    let cut = false;
    const end = (): void => {
      if (run.length > 1) pieces.push({ corners: run, closed: false });
      run = [];
    };
    const own: { a: P; b: P }[] = [];
    for (let i = 0; i < (line.closed ? n : n - 1); i++) {
      const [c, d] = [line.corners[i]!, line.corners[(i + 1) % n]!];
      if (c.bulge !== 0) {
        if (run.length === 0) run.push(c);
        else run[run.length - 1] = { ...run.at(-1)!, bulge: c.bulge };
        run.push({ ...d, bulge: 0 });
        continue;
      }
      const left = leftOver([c.x, c.y], [d.x, d.y], drawn);
      own.push({ a: [c.x, c.y], b: [d.x, d.y] });
      if (left.length !== 1 || left[0]![0] > 0 || left[0]![1] < 1) cut = true;
      for (const [s, t] of left) {
        if (s > 0) end();
        if (run.length === 0) run.push({ x: c.x + s * (d.x - c.x), y: c.y + s * (d.y - c.y), bulge: 0 });
        run.push({ x: c.x + t * (d.x - c.x), y: c.y + t * (d.y - c.y), bulge: 0 });
        if (t < 1) end();
      }
      if (left.length === 0) end();
    }
    end();
    drawn.push(...own);
    return cut ? pieces : [line];
  });
}

/** Shares of the side from a to b that no earlier side covers. */
function leftOver(a: P, b: P, drawn: readonly { readonly a: P; readonly b: P }[]): [number, number][] {
  const l = Math.hypot(b[0] - a[0], b[1] - a[1]);
  const [ux, uy] = [(b[0] - a[0]) / l, (b[1] - a[1]) / l];
  const place = (p: P): readonly [number, number] => [
    (p[0] - a[0]) * ux + (p[1] - a[1]) * uy,
    (p[1] - a[1]) * ux - (p[0] - a[0]) * uy,
  ];
  let left: [number, number][] = [[0, 1]];
  for (const other of drawn) {
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
