import type { Job } from '../../model/job/index.js';
import type { PanelPart } from '../../model/parts.js';

/** What decides how far one edge of a panel stays from the strut's axis. mm and rad. */
export interface EdgeSeat {
  readonly seating: PanelPart['seating'];
  readonly thickness: number;
  /** Heights of the panel's two faces over the plane of the strut axes, along the outward normal; low < high. */
  readonly low: number;
  readonly high: number;
  /** Reach of the strut towards the panel between those heights; null: the strut stays below or above. */
  readonly strutReach: number | null;
  /** Half the strut's width in the plane: where an edge without a neighbour ends that lies over the strut. */
  readonly strutHalf: number;
  /** Through the inside, to each panel on the other side of the strut; empty: none. */
  readonly dihedrals: readonly number[];
  readonly gap: number;
  /** How far the edge moves by heat and damp. */
  readonly movement: number;
}

export interface EdgeInset {
  /** From the strut's axis into the panel; negative: the panel reaches beyond the axis. */
  readonly inset: number;
  /** From square, rad; positive: the outer face is the larger. */
  readonly bevel: number;
}

/** Nearest that two panels at an edge may come to edge-on: a sharper pair has no seat. rad */
const SHARPEST = 1e-3;

/**
 * The inset of an edge. Between the struts: the strut's reach, or (t/2)/tan(δ/2) where the neighbour at δ needs more,
 * and the gap and the movement. Over or under them: to the plane that halves the angle between the two panels, which at
 * height h over the axes lies h/tan(δ/2) beyond the strut, less half the gap; a square edge by its worse face, a bevelled
 * one by its better.
 */
export function edgeInset(seat: EdgeSeat, edges: Job['panels']['edges']): EdgeInset {
  const half = seat.dihedrals.map((d) => Math.max(SHARPEST, d / 2));
  if (seat.seating === 'between') {
    const meet = half.map((h) => seat.thickness / 2 / Math.tan(Math.min(h, Math.PI - h)));
    return { inset: Math.max(seat.strutReach ?? 0, 0, ...meet) + seat.gap + seat.movement, bevel: 0 };
  }
  const inSlab = seat.strutReach === null ? -Infinity : seat.strutReach + seat.gap + seat.movement;
  if (half.length === 0) return { inset: Math.max(-seat.strutHalf, inSlab), bevel: 0 };
  const beyond = half.map((h) => {
    const back = (seat.gap / 2 + seat.movement) / Math.sin(h);
    const [low, high] = [seat.low / Math.tan(h), seat.high / Math.tan(h)];
    return { square: Math.min(low, high) - back, bevelled: Math.max(low, high) - back, bevel: Math.PI / 2 - h };
  });
  const worst = beyond.reduce((a, b) => (b.square < a.square ? b : a));
  const bevelled = edges === 'bevelled';
  const out = bevelled ? worst.bevelled : worst.square;
  return { inset: Math.max(-out, inSlab), bevel: bevelled && -out >= inSlab ? worst.bevel : 0 };
}
