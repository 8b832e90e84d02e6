import { normalise, type Vec3 } from '../../../maths/vec3.js';
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

/** Light from the eye's upper left, and from the eye itself: to the right, up, towards the eye. */
export const SIDE_LIGHT = normalise([-0.35, 0.6, 0.72]);
export const EYE_LIGHT: Vec3 = [0, 0, 1];
/** Share of light that reaches every side. */
const AMBIENT = 0.3;

/**
 * Draws a mesh into a depth image by scan conversion of its triangles (Pineda 1988, edge functions), flat shaded.
 *
 * @param positions x, y, z a vertex, mm; @param triangles three vertices each, anticlockwise from outside
 * @param camera right-handed unit axes: to the right, up, towards the eye; @param perMm pixels a millimetre
 * @param light direction to the light in the camera's axes, unit
 */
export function depthImage(
  positions: Float32Array,
  triangles: Uint32Array,
  camera: Axes,
  perMm: number,
  light: Vec3 = SIDE_LIGHT,
): DepthImage {
  const seen = project(positions, camera, perMm);
  const { left, low, width, height } = boundsOf(seen);
  const depth = new Float32Array(width * height).fill(Number.NEGATIVE_INFINITY);
  const shade = new Uint8Array(width * height);
  for (let t = 0; t < triangles.length; t += 3) {
    const a = 3 * triangles[t]!;
    const b = 3 * triangles[t + 1]!;
    const c = 3 * triangles[t + 2]!;
    const ax = seen[a]! - left;
    const ay = seen[a + 1]! - low;
    const bx = seen[b]! - left;
    const by = seen[b + 1]! - low;
    const cx = seen[c]! - left;
    const cy = seen[c + 1]! - low;
    const area = (bx - ax) * (cy - ay) - (by - ay) * (cx - ax);
    // Sides that look away are hidden by those that look here: the mesh is closed.
    if (!(area > 0)) continue;
    // Pixels whose middles the triangle's box holds.
    const x0 = Math.ceil(Math.min(ax, bx, cx) - 0.5);
    const x1 = Math.floor(Math.max(ax, bx, cx) - 0.5);
    const y0 = Math.ceil(Math.min(ay, by, cy) - 0.5);
    const y1 = Math.floor(Math.max(ay, by, cy) - 0.5);
    if (x1 < x0 || y1 < y0) continue;
    const az = seen[a + 2]!;
    const ez = seen[b + 2]! - az;
    const fz = seen[c + 2]! - az;
    // Depth is in mm and the rest in pixels: the normal is made from mm.
    const ex = (bx - ax) / perMm;
    const ey = (by - ay) / perMm;
    const fx = (cx - ax) / perMm;
    const fy = (cy - ay) / perMm;
    const nx = ey * fz - ez * fy;
    const ny = ez * fx - ex * fz;
    const nz = ex * fy - ey * fx;
    const lit = Math.max(0, (nx * light[0] + ny * light[1] + nz * light[2]) / Math.sqrt(nx * nx + ny * ny + nz * nz));
    const value = Math.max(1, Math.round(255 * (AMBIENT + (1 - AMBIENT) * lit)));
    for (let y = y0; y <= y1; y++) {
      const py = y + 0.5;
      for (let x = x0; x <= x1; x++) {
        const px = x + 0.5;
        const wb = (cy - ay) * (px - ax) - (cx - ax) * (py - ay);
        const wc = (bx - ax) * (py - ay) - (by - ay) * (px - ax);
        if (wb < 0 || wc < 0 || wb + wc > area) continue;
        const z = az + (wb * ez + wc * fz) / area;
        const i = y * width + x;
        if (z <= depth[i]!) continue;
        depth[i] = z;
        shade[i] = value;
      }
    }
  }
  return { left, low, width, height, depth, shade };
}

type Axes = Pick<Camera, 'right' | 'up' | 'toward'>;

/** Width and height of a mesh as it is seen, mm. */
export function seenSize(positions: Float32Array, camera: Axes): { readonly width: number; readonly height: number } {
  const { right, high, left, low } = extremes(project(positions, camera, 1));
  return { width: right - left, height: high - low };
}

function boundsOf(seen: Float64Array): { left: number; low: number; width: number; height: number } {
  const e = extremes(seen);
  const left = Math.floor(e.left);
  const low = Math.floor(e.low);
  return { left, low, width: Math.floor(e.right) - left + 1, height: Math.floor(e.high) - low + 1 };
}

function extremes(seen: Float64Array): { left: number; right: number; low: number; high: number } {
  if (seen.length === 0) return { left: 0, right: 0, low: 0, high: 0 };
  let left = seen[0]!;
  let right = left;
  let low = seen[1]!;
  let high = low;
  for (let i = 3; i < seen.length; i += 3) {
    const u = seen[i]!;
    const v = seen[i + 1]!;
    if (u < left) left = u;
    if (u > right) right = u;
    if (v < low) low = v;
    if (v > high) high = v;
  }
  return { left, right, low, high };
}

/** u and v in pixels, depth in mm, a vertex. */
function project(positions: Float32Array, { right, up, toward }: Axes, perMm: number): Float64Array {
  const seen = new Float64Array(positions.length);
  for (let i = 0; i < positions.length; i += 3) {
    const x = positions[i]!;
    const y = positions[i + 1]!;
    const z = positions[i + 2]!;
    seen[i] = (x * right[0] + y * right[1] + z * right[2]) * perMm;
    seen[i + 1] = (x * up[0] + y * up[1] + z * up[2]) * perMm;
    seen[i + 2] = x * toward[0] + y * toward[1] + z * toward[2];
  }
  return seen;
}
