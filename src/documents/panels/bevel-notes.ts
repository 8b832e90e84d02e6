import { letters } from '../../detailing/panels/engraving.js';
import type { PanelPart, Point2, Polyline2 } from '../../model/parts.js';

/** Height of the letters, mm, and how far they stand from the edge, in heights. */
const HEIGHT = 4;
const OFF = 0.6;

/** What a bevelled edge says beside itself: its tilt from square, and which face of the panel is the smaller, as it lies outer side up. */
export const sayBevel = (bevel: number): string =>
  `BEVEL ${Math.abs((bevel * 180) / Math.PI).toFixed(1)} ${bevel > 0 ? 'UNDER' : 'TOP'}`;

/** Single strokes along every bevelled edge, inside the outline, in the panel's frame; none where an edge is too short for them. */
export function bevelNotes(panel: PanelPart): Polyline2[] {
  return panel.edges.flatMap((edge) => {
    if (edge.bevel === 0 || !edge.side) return [];
    const [a, b] = edge.side;
    const l = Math.hypot(b[0] - a[0], b[1] - a[1]);
    const text = letters(sayBevel(edge.bevel), HEIGHT);
    if (text.width + 2 * HEIGHT > l) return [];
    const [ux, uy] = [(b[0] - a[0]) / l, (b[1] - a[1]) / l];
    // In the first half of the edge: the strut's mark may be engraved in its middle.
    const start = Math.max(HEIGHT, l / 4 - text.width / 2);
    return text.strokes.map((line) =>
      line.map(([x, y]): Point2 => {
        const [s, d] = [start + x, OFF * HEIGHT + y];
        return [a[0] + ux * s - uy * d, a[1] + uy * s + ux * d];
      }),
    );
  });
}
