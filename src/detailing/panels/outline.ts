import { areaOf, offsetRings } from '../../maths/polygon/boolean.js';
import { type Ring, signedArea, toPoints, toRing } from '../../maths/polygon/ring.js';
import { tidyRing } from '../../maths/polygon/tidy.js';
import type { Job } from '../../model/job/index.js';
import { movedEdges } from './base-outline.js';
import type { PanelChoice } from './choice.js';
import { cutCorner } from './corner-cut.js';
import type { FaceLoop } from './face-loop.js';
import type { Seats } from './seats.js';
import type { PanelSetting } from './setting.js';

/** Corners nearer than this are one: ten steps of the integer grid of the polygon library. mm */
const SAME_CORNER = 1e-4;

/** A node's hub between a panel's faces, as polygons in the panel's plane. */
export type HubRings = (node: string) => readonly Ring[];

/** Hubs in the plane of a loop. */
export function hubRingsIn(setting: PanelSetting, loop: FaceLoop, seats: Seats): HubRings {
  const { origin, x, y } = loop.frame;
  return (node) => {
    const hub = setting.hubs.find((h) => h.mark === node);
    if (!hub) return [];
    return setting
      .hubOutline(hub, { origin, x, y, from: seats.low, to: seats.high })
      .map((polygon) => tidyRing(toRing(polygon), SAME_CORNER))
      .filter((ring) => ring.length >= 6);
  };
}

/** The outline inside its struts and clear of its hubs, largest piece first; specks left out. */
export function outlineOf(
  setting: PanelSetting,
  loop: FaceLoop,
  choice: PanelChoice,
  seats: Seats,
  hubs: HubRings,
): Ring[] {
  const { job } = setting;
  let rings = movedEdges(loop.corners, seats.insets);
  const movement = Math.max(0, ...seats.movements);
  const radius = cornerRadius(job, choice);
  const clear = Math.max(job.panels.gap_mm + movement, radius);
  loop.nodes.forEach((node, i) => {
    rings = cutCorner(rings, loop.corners, i, hubs(node), clear, job.panels.corner);
  });
  if (radius > 0) rings = rings.map((r) => roundInsideCorners(r, radius));
  // A speck that a cut leaves beside the panel is waste, not a piece: less than a thickness square.
  const speck = choice.thickness * choice.thickness;
  return rings.map((r) => tidyRing(r, SAME_CORNER)).filter((r) => r.length >= 6 && areaOf([r]) > speck);
}

/** Radius at inside corners where the job gives none: a laser in acrylic 0.5 mm (common practice), a router its tool's. */
export function cornerRadius(job: Job, choice: PanelChoice): number {
  if (job.panels.cornerRadius_mm !== undefined) return job.panels.cornerRadius_mm;
  if (job.cutter.kind === 'router') return job.cutter.tool_mm / 2;
  return choice.material?.family === 'acrylic' || choice.material?.family === 'plastic-sheet' ? 0.5 : 0;
}

/** Inward corners filled to the radius, outward ones left sharp: out with sharp corners, back with round ones. */
function roundInsideCorners(ring: Ring, radius: number): Ring {
  const convex = toPoints(ring).every((b, i, all) => {
    const [a, c] = [all[(i + all.length - 1) % all.length]!, all[(i + 1) % all.length]!];
    return (b[0] - a[0]) * (c[1] - b[1]) - (b[1] - a[1]) * (c[0] - b[0]) >= 0;
  });
  if (convex) return ring;
  const back = offsetRings(offsetRings([ring], radius, 'mitre'), -radius, 'round');
  return back.length > 0 ? back.reduce((a, b) => (signedArea(b) > signedArea(a) ? b : a)) : ring;
}
