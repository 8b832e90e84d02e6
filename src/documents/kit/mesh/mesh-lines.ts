import { cross, dot, normalise, subtract, type Vec3 } from '../../../maths/vec3.js';
import type { Camera } from '../view/camera.js';
import { type DepthImage, depthImage } from './depth-image.js';

/** A stretch of an edge that is seen, in mm to the right and up. */
export type SeenLine = readonly [readonly [number, number], readonly [number, number]];

/** Faces that meet at more than this make an edge that is drawn, cosine: 30 degrees. */
const SHARP = Math.cos(Math.PI / 6);
/** Pixels a millimetre of the image that says what is hidden, and how far behind its surface an edge may lie, mm. */
const [PER_MM, BEHIND] = [6, 0.12] as const;
/** Stretches shorter than this are dust, mm. */
const DUST = 0.12;

/**
 * The edges of a closed mesh that are seen along a direction without perspective: sharp edges and outlines, each cut to what no
 * face hides. An edge's points are held against a depth image, one sample a pixel, the nearest pixels round it forgiving.
 */
export function meshLines(
  positions: Float32Array,
  triangles: Uint32Array,
  camera: Pick<Camera, 'right' | 'up' | 'toward'>,
): SeenLine[] {
  const image = depthImage(positions, triangles, camera, PER_MM);
  const at = (i: number): Vec3 => [positions[3 * i]!, positions[3 * i + 1]!, positions[3 * i + 2]!];
  const normals: Vec3[] = [];
  for (let t = 0; t < triangles.length; t += 3) {
    const a = at(triangles[t]!);
    normals.push(normalise(cross(subtract(at(triangles[t + 1]!), a), subtract(at(triangles[t + 2]!), a))));
  }
  const firstFace = new Map<number, number>();
  const count = positions.length / 3;
  const lines: SeenLine[] = [];
  for (let k = 0; k < triangles.length; k++) {
    const [a, b] = [triangles[k]!, triangles[k % 3 === 2 ? k - 2 : k + 1]!];
    const face = Math.floor(k / 3);
    const other = firstFace.get(b * count + a);
    if (other === undefined) {
      firstFace.set(a * count + b, face);
      continue;
    }
    const [m, n] = [normals[face]!, normals[other]!];
    const [here, there] = [dot(m, camera.toward) > 1e-6, dot(n, camera.toward) > 1e-6];
    if (!(here || there)) continue;
    if (here === there && dot(m, n) > SHARP) continue;
    lines.push(...seenParts(image, at(a), at(b), camera));
  }
  return lines;
}

function seenParts(
  image: DepthImage,
  a: Vec3,
  b: Vec3,
  { right, up, toward }: Pick<Camera, 'right' | 'up' | 'toward'>,
): SeenLine[] {
  const [ua, va, da] = [dot(a, right), dot(a, up), dot(a, toward)];
  const [ub, vb, db] = [dot(b, right), dot(b, up), dot(b, toward)];
  const steps = Math.max(1, Math.ceil(Math.hypot(ub - ua, vb - va) * PER_MM));
  const point = (s: number): [number, number] => [ua + (ub - ua) * s, va + (vb - va) * s];
  const parts: SeenLine[] = [];
  let from: number | null = null;
  for (let i = 0; i <= steps; i++) {
    const s = i < steps ? (i + 0.5) / steps : 1;
    const [u, v] = point(s);
    const seen = i < steps && isSeen(image, u, v, da + (db - da) * s);
    if (seen && from === null) from = i / steps;
    if (!seen && from !== null) {
      const [p, q] = [point(from), point(i / steps)];
      if (Math.hypot(q[0] - p[0], q[1] - p[1]) > DUST) parts.push([p, q]);
      from = null;
    }
  }
  return parts;
}

/** Whether some pixel at or beside the point shows nothing nearer than the point. */
function isSeen(image: DepthImage, u: number, v: number, depth: number): boolean {
  const [x, y] = [Math.floor(u * PER_MM) - image.left, Math.floor(v * PER_MM) - image.low];
  for (let dy = -1; dy <= 1; dy++)
    for (let dx = -1; dx <= 1; dx++) {
      const [i, j] = [x + dx, y + dy];
      if (i < 0 || j < 0 || i >= image.width || j >= image.height) return true;
      if (image.depth[j * image.width + i]! <= depth + BEHIND) return true;
    }
  return false;
}
