/** A point on a sheet, mm from its top left corner, y down. */
export type Point = readonly [number, number];

/** An upright rectangle on a sheet, mm. */
export interface Area {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** A rectangle turned by `angle` (rad, clockwise on the sheet) about its middle (x, y). */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly angle: number;
}

/** The four corners of a box, in order. */
export function corners(box: Box): Point[] {
  const [c, s] = [Math.cos(box.angle), Math.sin(box.angle)];
  const [a, b] = [box.width / 2, box.height / 2];
  return (
    [
      [-a, -b],
      [a, -b],
      [a, b],
      [-a, b],
    ] as const
  ).map(([u, v]) => [box.x + u * c - v * s, box.y + u * s + v * c]);
}

/** Whether two boxes overlap by more than `slack` mm: separating axes (Gottschalk, Lin, Manocha 1996) in the plane. */
export function overlap(a: Box, b: Box, slack = 0): boolean {
  const dx = b.x - a.x;
  const dy = b.y - a.y;
  const upright = a.angle === 0 && b.angle === 0;
  // The cheaper test first: labels are tried in their thousands.
  if (upright && !(Math.abs(dx) < (a.width + b.width) / 2 - slack && Math.abs(dy) < (a.height + b.height) / 2 - slack))
    return false;
  const ra = Math.hypot(a.width, a.height) / 2;
  const rb = Math.hypot(b.width, b.height) / 2;
  if (dx * dx + dy * dy >= (ra + rb - slack) ** 2) return false;
  if (upright) return true;
  return !parted(a, b, dx, dy, slack) && !parted(b, a, dx, dy, slack);
}

/** Whether one of the axes of `a` parts the two boxes. */
function parted(a: Box, b: Box, dx: number, dy: number, slack: number): boolean {
  const c = Math.cos(a.angle);
  const s = Math.sin(a.angle);
  return (
    Math.abs(dx * c + dy * s) - a.width / 2 - reach(b, c, s) > -slack ||
    Math.abs(dy * c - dx * s) - a.height / 2 - reach(b, -s, c) > -slack
  );
}

/** Half the box's extent along the unit vector (ux, uy). */
export function reach(box: Box, ux: number, uy: number): number {
  if (box.angle === 0) return (Math.abs(ux) * box.width + Math.abs(uy) * box.height) / 2;
  const c = Math.cos(box.angle);
  const s = Math.sin(box.angle);
  return (Math.abs(ux * c + uy * s) * box.width + Math.abs(uy * c - ux * s) * box.height) / 2;
}

/** Length of the part of the segment p-q inside the box, mm. */
export function lengthInside(box: Box, p: Point, q: Point): number {
  // Most pairs are far apart: the segment's upright bounds against the box's circle.
  const radius = (box.width + box.height) / 2;
  if (Math.min(p[0], q[0]) > box.x + radius || Math.max(p[0], q[0]) < box.x - radius) return 0;
  if (Math.min(p[1], q[1]) > box.y + radius || Math.max(p[1], q[1]) < box.y - radius) return 0;
  // Numbers and no arrays: millions of pairs are measured for one paper.
  const c = Math.cos(box.angle);
  const s = Math.sin(box.angle);
  const au = (p[0] - box.x) * c + (p[1] - box.y) * s;
  const du = (q[0] - box.x) * c + (q[1] - box.y) * s - au;
  const av = (p[1] - box.y) * c - (p[0] - box.x) * s;
  const dv = (q[1] - box.y) * c - (q[0] - box.x) * s - av;
  let low = 0;
  let high = 1;
  for (let axis = 0; axis < 2; axis++) {
    const half = (axis === 0 ? box.width : box.height) / 2;
    const a = axis === 0 ? au : av;
    const d = axis === 0 ? du : dv;
    if (Math.abs(d) < 1e-12) {
      if (Math.abs(a) >= half) return 0;
      continue;
    }
    const t0 = (-half - a) / d;
    const t1 = (half - a) / d;
    low = Math.max(low, Math.min(t0, t1));
    high = Math.min(high, Math.max(t0, t1));
    if (low >= high) return 0;
  }
  return (high - low) * Math.hypot(du, dv);
}

/** The area less `by` mm on every side. */
export const shrink = (area: Area, by: number): Area => ({
  x: area.x + by,
  y: area.y + by,
  width: area.width - 2 * by,
  height: area.height - 2 * by,
});
