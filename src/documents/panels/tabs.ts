import type { DrawingLine } from '../kit/drawing.js';
import { type Span, straightSides } from './without-spans.js';

/** Straight sides at least this many gap widths long carry a tab. */
const SIDE_OVER_GAP = 6;
/** Tabs of one panel at most: more hold no better and are more to file. */
const MOST_TABS = 4;

/**
 * Where a cut is interrupted so that holding tabs of `width` mm are left: in the middle of each of its longest straight sides, up to four. The
 * cutter's own half width at both ends of the gap eats into the tab, so the gap is wider by `kerf`. Without a side long enough there is none.
 */
export function tabSpans(line: DrawingLine, width: number, kerf: number): Span[] {
  const gap = width + kerf;
  const length = ({ a, b }: Span): number => Math.hypot(b[0] - a[0], b[1] - a[1]);
  return straightSides(line)
    .filter((side) => length(side) >= SIDE_OVER_GAP * gap)
    .map((side, i) => ({ side, i }))
    .sort((p, q) => length(q.side) - length(p.side) || p.i - q.i)
    .slice(0, MOST_TABS)
    .map(({ side }) => {
      const share = gap / 2 / length(side);
      const at = (t: number): readonly [number, number] => [
        side.a[0] + t * (side.b[0] - side.a[0]),
        side.a[1] + t * (side.b[1] - side.a[1]),
      ];
      return { a: at(0.5 - share), b: at(0.5 + share) };
    });
}
