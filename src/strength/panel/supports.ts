import type { Job } from '../../model/job/index.js';
import type { PanelPart, Point2 } from '../../model/parts.js';
import type { PlateSupports } from './plate.js';

/** Which way a pressure acts on a panel. */
export type Sense = 'pressure' | 'suction';

/** An outline's side lies along a face's edge when it runs within this angle of it (sine) and this far from its inset line, as a share of the edge. */
const ALONG = { sine: 0.03, off: 0.01 } as const;

/**
 * What carries a panel against a pressure of a sense. On struts it rests along every edge that has one: a panel over them under pressure, one
 * under them in suction. Everything else hangs on its fixings: the channel's edges, or ties and stand-offs at their holes, or clips spread
 * along the edges. null: nothing carries it.
 *
 * @param corners the face's nodes in the panel's frame, mm, in the order of the part's edges
 */
export function panelSupports(
  part: PanelPart,
  corners: readonly Point2[],
  job: Job,
  sense: Sense,
): PlateSupports | null {
  const rests = (part.seating === 'over' && sense === 'pressure') || (part.seating === 'under' && sense === 'suction');
  const { holdBy } = job.panels;
  if (rests || holdBy === 'channel') {
    const edges = sidesOnStruts(part, corners);
    return edges.length > 0 ? { edges, points: [] } : null;
  }
  if (holdBy === 'none') return null;
  const points = holdBy === 'clips' ? clipPoints(part, corners, job) : part.holes.map(middle);
  return points.length > 0 ? { edges: [], points } : null;
}

/** Sides of the outline, by the index of their first corner, that run along an edge of the face with a strut. */
function sidesOnStruts(part: PanelPart, corners: readonly Point2[]): readonly number[] {
  const { outline, edges } = part;
  return outline.flatMap((a, i) => {
    const b = outline[(i + 1) % outline.length]!;
    const side = [b[0] - a[0], b[1] - a[1]] as const;
    const l = Math.hypot(side[0], side[1]);
    const along = edges.some((edge, e) => {
      if (edge.strut === null || l === 0) return false;
      const [p, q] = [corners[e]!, corners[(e + 1) % corners.length]!];
      const [ux, uy] = [(q[0] - p[0]) / edge.length, (q[1] - p[1]) / edge.length];
      const turned = Math.abs(side[0] * uy - side[1] * ux) / l;
      const off = (x: Point2): number =>
        Math.abs(Math.abs(ux * (x[1] - p[1]) - uy * (x[0] - p[0])) - Math.abs(edge.inset));
      return turned < ALONG.sine && Math.max(off(a), off(b)) < ALONG.off * edge.length;
    });
    return along ? [i] : [];
  });
}

/** Clips evenly along each edge with a strut, one a pitch and one at least, at the panel's edge. */
function clipPoints(part: PanelPart, corners: readonly Point2[], job: Job): readonly Point2[] {
  return part.edges.flatMap((edge, e) => {
    if (edge.strut === null) return [];
    const [p, q] = [corners[e]!, corners[(e + 1) % corners.length]!];
    const [ux, uy] = [(q[0] - p[0]) / edge.length, (q[1] - p[1]) / edge.length];
    const n = Math.max(1, Math.floor(edge.length / job.panels.holes.pitch_mm));
    return Array.from({ length: n }, (_, k): Point2 => {
      const s = (edge.length * (k + 0.5)) / n;
      return [p[0] + ux * s - uy * edge.inset, p[1] + uy * s + ux * edge.inset];
    });
  });
}

/** Middle of a hole's outline. */
function middle(hole: readonly Point2[]): Point2 {
  const n = hole.length;
  return [hole.reduce((s, p) => s + p[0], 0) / n, hole.reduce((s, p) => s + p[1], 0) / n];
}
