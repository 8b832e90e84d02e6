import type { BulgedCorner } from '../../maths/polygon/arcs.js';
import type { DrawingLine } from '../kit/drawing.js';

type P = readonly [number, number];
/** Whether the cutter may run from a to b without touching another panel or leaving the sheet. */
export type IsFree = (a: P, b: P) => boolean;

/** Shares of the length asked for that are tried one after another where there is no room for all of it. */
const SHARES = [1, 0.5, 0.25] as const;

/**
 * A cut begun in the waste, `lead` mm from where it meets its own line. A closed one comes in at 45° to the middle of a straight side, the
 * longest first, and ends where it met it; an open one comes square to its end, so that nothing is taken of a tab beside it. `side` says where
 * the waste is of a cut that runs anticlockwise. Without free room the lead is shortened, then left out.
 */
export function withLeadIn(line: DrawingLine, lead: number, side: 'outside' | 'inside', isFree: IsFree): DrawingLine {
  return line.closed ? closedLead(line, lead, side, isFree) : openLead(line, lead, isFree);
}

function closedLead(line: DrawingLine, lead: number, side: 'outside' | 'inside', isFree: IsFree): DrawingLine {
  const { corners } = line;
  const n = corners.length;
  const length = (i: number): number =>
    Math.hypot(corners[(i + 1) % n]!.x - corners[i]!.x, corners[(i + 1) % n]!.y - corners[i]!.y);
  const sides = corners
    .map((_, i) => i)
    .filter((i) => corners[i]!.bulge === 0 && length(i) > 0)
    .sort((a, b) => length(b) - length(a) || a - b);
  if (sides.length === 0) {
    // All arcs, as a round hole: straight in from its middle where the waste lies inside, else left as it is.
    if (side === 'outside') return line;
    const middle = corners.reduce<P>((m, c) => [m[0] + c.x / n, m[1] + c.y / n], [0, 0]);
    return open([corner(middle), ...corners, { ...corners[0]!, bulge: 0 }]);
  }
  const out = side === 'outside' ? 1 : -1;
  for (const share of SHARES)
    for (const i of sides) {
      const [a, b] = [corners[i]!, corners[(i + 1) % n]!];
      const [ux, uy] = [(b.x - a.x) / length(i), (b.y - a.y) / length(i)];
      const start: P = [(a.x + b.x) / 2, (a.y + b.y) / 2];
      // Not past the side's own end: at an inward corner the panel itself is beyond it.
      const s = Math.min(share * lead * Math.SQRT1_2, length(i) / 2);
      const from: P = [start[0] - s * ux + s * uy * out, start[1] - s * uy - s * ux * out];
      if (!isFree(from, start)) continue;
      const round = Array.from({ length: n }, (_, k) => corners[(i + 1 + k) % n]!);
      return open([corner(from), corner(start), ...round, corner(start)]);
    }
  return line;
}

/** Of a cut that runs anticlockwise round its panel: the waste is to its right. */
function openLead(line: DrawingLine, lead: number, isFree: IsFree): DrawingLine {
  const first = line.corners[0]!;
  const next = line.corners[1]!;
  if (first.bulge !== 0) return line;
  const l = Math.hypot(next.x - first.x, next.y - first.y) || 1;
  const right: P = [(next.y - first.y) / l, -(next.x - first.x) / l];
  for (const share of SHARES) {
    const from: P = [first.x + share * lead * right[0], first.y + share * lead * right[1]];
    if (isFree(from, [first.x, first.y])) return open([corner(from), ...line.corners]);
  }
  return line;
}

const corner = ([x, y]: P): BulgedCorner => ({ x, y, bulge: 0 });
const open = (corners: readonly BulgedCorner[]): DrawingLine => ({ corners, closed: false });
