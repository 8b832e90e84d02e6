import { dot, normalise, type Vec3 } from '../../../maths/vec3.js';
import type { Camera } from '../view/camera.js';

/**
 * A mesh seen along a direction without perspective: what is nearest in each pixel. Pixel (i, j) covers i <= u k < i + 1 and
 * j <= v k < j + 1, where u and v run to the right and up in mm and k is the pixels a millimetre; rows run upwards.
 */
export interface DepthImage {
  /** Lower left pixel. */
  readonly left: number;
  readonly low: number;
  readonly width: number;
  readonly height: number;
  /** Towards the eye, mm; -Infinity where there is nothing. */
  readonly depth: Float32Array;
  /** Brightness of what is seen, 1 to 255. */
  readonly shade: Uint8Array;
}

/** Light comes from the eye's upper left. */
const LIGHT = normalise([-0.35, 0.6, 0.72]);
/** Share of light that reaches every side. */
const AMBIENT = 0.3;

/**
 * Draws a mesh into a depth image by scan conversion of its triangles (Pineda 1988, edge functions), flat shaded.
 *
 * @param positions x, y, z a vertex, mm; @param triangles three vertices each, anticlockwise from outside
 * @param camera right-handed unit axes: to the right, up, towards the eye; @param perMm pixels a millimetre
 */
export function depthImage(
  positions: Float32Array,
  triangles: Uint32Array,
  camera: Pick<Camera, 'right' | 'up' | 'toward'>,
  perMm: number,
): DepthImage {
  const seen = project(positions, camera, perMm);
  let [left, low, right, high] = [0, 0, 0, 0];
  for (let i = 0; i < seen.length; i += 3) {
    const [u, v] = [Math.floor(seen[i]!), Math.floor(seen[i + 1]!)];
    if (i === 0) [left, low, right, high] = [u, v, u, v];
    else {
      if (u < left) left = u;
      if (u > right) right = u;
      if (v < low) low = v;
      if (v > high) high = v;
    }
  }
  const [width, height] = [right - left + 1, high - low + 1];
  const depth = new Float32Array(width * height).fill(Number.NEGATIVE_INFINITY);
  const shade = new Uint8Array(width * height);
  for (let t = 0; t < triangles.length; t += 3) {
    const [a, b, c] = [3 * triangles[t]!, 3 * triangles[t + 1]!, 3 * triangles[t + 2]!];
    const [ax, ay, az] = [seen[a]! - left, seen[a + 1]! - low, seen[a + 2]!];
    const [bx, by, bz] = [seen[b]! - left, seen[b + 1]! - low, seen[b + 2]!];
    const [cx, cy, cz] = [seen[c]! - left, seen[c + 1]! - low, seen[c + 2]!];
    const area = (bx - ax) * (cy - ay) - (by - ay) * (cx - ax);
    // Sides that look away are hidden by those that look here: the mesh is closed.
    if (!(area > 0)) continue;
    const [x0, x1] = [Math.ceil(Math.min(ax, bx, cx) - 0.5), Math.floor(Math.max(ax, bx, cx) - 0.5)];
    const [y0, y1] = [Math.ceil(Math.min(ay, by, cy) - 0.5), Math.floor(Math.max(ay, by, cy) - 0.5)];
    if (x1 < x0 || y1 < y0) continue;
    // Depth is in mm, so its slope is scaled to pixels: only the sense of the normal matters for light.
    const [ex, ey, ez] = [(bx - ax) / perMm, (by - ay) / perMm, bz - az];
    const [fx, fy, fz] = [(cx - ax) / perMm, (cy - ay) / perMm, cz - az];
    const [nx, ny, nz] = [ey * fz - ez * fy, ez * fx - ex * fz, ex * fy - ey * fx];
    const size = Math.hypot(nx, ny, nz);
    const lit = Math.max(0, (nx * LIGHT[0] + ny * LIGHT[1] + nz * LIGHT[2]) / size);
    const value = Math.max(1, Math.round(255 * (AMBIENT + (1 - AMBIENT) * lit)));
    for (let y = y0; y <= y1; y++)
      for (let x = x0; x <= x1; x++) {
        const [px, py] = [x + 0.5, y + 0.5];
        const wc = (bx - ax) * (py - ay) - (by - ay) * (px - ax);
        const wa = (cx - bx) * (py - by) - (cy - by) * (px - bx);
        const wb = area - wa - wc;
        if (wa < 0 || wb < 0 || wc < 0) continue;
        const z = (wa * az + wb * bz + wc * cz) / area;
        const i = y * width + x;
        if (z <= depth[i]!) continue;
        depth[i] = z;
        shade[i] = value;
      }
  }
  return { left, low, width, height, depth, shade };
}

/** u and v in pixels, depth in mm, a vertex. */
function project(
  positions: Float32Array,
  { right, up, toward }: Pick<Camera, 'right' | 'up' | 'toward'>,
  perMm: number,
): Float64Array {
  const seen = new Float64Array(positions.length);
  for (let i = 0; i < positions.length; i += 3) {
    const p: Vec3 = [positions[i]!, positions[i + 1]!, positions[i + 2]!];
    seen[i] = dot(p, right) * perMm;
    seen[i + 1] = dot(p, up) * perMm;
    seen[i + 2] = dot(p, toward);
  }
  return seen;
}
