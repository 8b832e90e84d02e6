import { toRing } from '../../maths/polygon/ring.js';
import { addScaled, dot, negate, type Vec3 } from '../../maths/vec3.js';
import type { PanelPart } from '../../model/parts.js';
import type { Point } from '../kit/geometry2.js';
import { INK, LINE } from '../kit/ink.js';
import type { Paper } from '../kit/paper.js';
import { type Camera, ISOMETRIC, project } from '../kit/view/camera.js';
import type { PackRecords } from '../records.js';
import { panelSpot } from './panel-spot.js';

/** The isometric view's opposite: from the back, left and below. */
const FROM_BEHIND: Camera = {
  name: 'From behind and below',
  right: negate(ISOMETRIC.right),
  up: ISOMETRIC.up,
  toward: negate(ISOMETRIC.toward),
};

/**
 * Where each panel sits: two views from opposite sides, so that every panel shows its outer side in one of them. Panels
 * that face the viewer carry their mark, underlined; the others are drawn first, thin.
 */
export function drawPanelViews(paper: Paper, records: PackRecords, panels: readonly PanelPart[]): void {
  const area = paper.addSheet({
    title: 'Where the panels sit',
    instruction:
      'Each panel with its mark is seen from outside; thin outlines are seen from inside and carry their mark in the other view.',
  });
  const cameras = [ISOMETRIC, FROM_BEHIND].filter((c) => panels.some((p) => dot(p.frame.z, c.toward) > 0));
  const height = (area.height - 7 * cameras.length) / Math.max(2, cameras.length);
  cameras.forEach((camera, k) => {
    drawView(paper, records, panels, camera, { x: area.x, y: area.y + k * (height + 7), width: area.width, height });
  });
}

function drawView(
  paper: Paper,
  records: PackRecords,
  panels: readonly PanelPart[],
  camera: Camera,
  area: { readonly x: number; readonly y: number; readonly width: number; readonly height: number },
): void {
  const { pen } = paper;
  const { truss } = records.topology;
  const flat = truss.nodes.map((n) => project(camera, n.at));
  const [xs, ys] = [flat.map((p) => p[0]), flat.map((p) => p[1])];
  const [left, right, low, high] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
  const room = { width: area.width - 10, height: area.height - 12 };
  const scale = Math.min(room.width / (right - left || 1), room.height / (high - low || 1));
  const at = (p: Vec3): Point => {
    const [u, v] = project(camera, p);
    return [
      area.x + area.width / 2 + (u - (left + right) / 2) * scale,
      area.y + 7 + room.height / 2 - (v - (low + high) / 2) * scale,
    ];
  };
  pen.text(camera.name, area.x, area.y + 3, { size: 9, bold: true });
  for (const m of truss.members) {
    const [a, b] = m.ends.map((mark) => at(records.topology.at(mark))) as [Point, Point];
    pen.line(a, b, { width: LINE.thin, colour: INK.faint });
  }
  const inSpace = (panel: PanelPart, [x, y]: readonly [number, number]): Vec3 =>
    addScaled(addScaled(panel.frame.origin, panel.frame.x, x), panel.frame.y, y);
  const facing = (panel: PanelPart): number => dot(panel.frame.z, camera.toward);
  const depth = (panel: PanelPart): number => project(camera, panel.frame.origin)[2];
  const order = [...panels].sort((a, b) => Number(facing(a) > 0) - Number(facing(b) > 0) || depth(a) - depth(b));
  for (const panel of order) {
    const points = panel.outline.map((p) => at(inSpace(panel, p)));
    if (facing(panel) <= 0) {
      pen.polyline(points, { width: LINE.hair, colour: INK.grey }, true);
      continue;
    }
    pen.polygon(points, '#ececec', { width: LINE.normal });
  }
  // Marks last, each in its own panel's room as seen: a nearer panel may cover a farther one's mark, never its letters.
  for (const panel of order) {
    if (facing(panel) <= 0) continue;
    const points = panel.outline.map((p) => at(inSpace(panel, p)));
    const ring = toRing(points.map(([x, y]) => [x, -y] as const));
    const [x, y, clear] = panelSpot(ring, panel.mark);
    if (covered([x, -y], panel, order, (q, p) => at(inSpace(q, p)), facing)) continue;
    const size = Math.max(6, Math.min(14, (2 * clear * 0.8 * 10) / pen.widthOf(panel.mark, { size: 10, bold: true })));
    const width = pen.widthOf(panel.mark, { size, bold: true });
    pen.text(panel.mark, x, -y + size * 0.12, { size, bold: true, align: 'centre' });
    pen.line([x - width / 2, -y + size * 0.12 + 0.7], [x + width / 2, -y + size * 0.12 + 0.7], { width: LINE.normal });
  }
}

/** Whether a panel drawn later lies over the point. */
function covered(
  point: readonly [number, number],
  panel: PanelPart,
  order: readonly PanelPart[],
  at: (panel: PanelPart, p: readonly [number, number]) => Point,
  facing: (panel: PanelPart) => number,
): boolean {
  return order.slice(order.indexOf(panel) + 1).some((other) => {
    if (facing(other) <= 0) return false;
    const q = other.outline.map((p) => at(other, p));
    let odd = false;
    q.forEach(([ax, ay], i) => {
      const [bx, by] = q[(i + 1) % q.length]!;
      if (ay > point[1] !== by > point[1] && point[0] < ax + ((point[1] - ay) * (bx - ax)) / (by - ay)) odd = !odd;
    });
    return odd;
  });
}
