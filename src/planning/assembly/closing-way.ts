import type { EndDetail } from '../../model/parts.js';

/** One end of a strut as closing it sees it. */
export interface ClosingEnd {
  readonly kind: EndDetail | 'clamp';
  /** Largest half-size of the sleeve there, mm. */
  readonly sleeve: number;
}

/**
 * The end whose detail lets a strut in between two hubs that stand, or null. Laid in at both ends (drop-in or clamp) it need
 * not tilt. Else its end must be lifted, while the other is in its socket, past what stands there: over the cradle's sleeve; over
 * the half of a clamp; of a slide, which has gone in first, past the far sleeve. That must stay within `aside`, what bending and
 * play allow at a strut's end. `radius`: of the strut, mm.
 */
export function closingEnd(
  ends: readonly [ClosingEnd, ClosingEnd],
  radius: number,
  aside: number,
): { readonly end: 0 | 1; readonly kind: 'drop-in' | 'slide' | 'clamp' } | null {
  const open = ({ kind }: ClosingEnd): boolean => kind === 'drop-in' || kind === 'clamp';
  const lifts = ([0, 1] as const).flatMap((end) => {
    const { kind } = ends[end];
    if (kind === 'plain') return [];
    const past = kind === 'clamp' ? 0 : ends[kind === 'slide' ? 1 - end : end]!.sleeve;
    return [{ end, kind, lift: open(ends[0]) && open(ends[1]) ? 0 : past + radius }];
  });
  lifts.sort((a, b) => a.lift - b.lift);
  const best = lifts[0];
  return best && best.lift <= aside ? { end: best.end, kind: best.kind } : null;
}
