import { largest, type Sleeve } from '../detailing/systems/sleeve.js';
import { add, addScaled, dot, length, scale, subtract, type Vec3 } from '../maths/vec3.js';
import type { ShapedPiece } from '../model/shaped.js';
import type { Channel } from './channels.js';

/** The thinnest wall found round one socket. */
export interface MeasuredWall {
  readonly strut: string;
  /** mm, along a ray square to the bore. */
  readonly thickness: number;
  /** Distance from the stop, mm. */
  readonly along: number;
}

const AZIMUTHS = 12;
/** Where rays are sent from, as shares of the depth from the stop: clear of the floor's vent and the mouth's chamfer. */
const SHARES = [0.2, 0.45, 0.7, 0.85] as const;
/** A ray starts this far outside the bore's nominal surface, mm: past the corners of its polygon. */
const START = 0.06;

/**
 * Walls measured on the made mesh: from each bore, rays square to it through the wall to the first surface beyond. A ray that
 * starts in a hole, a groove or an opening finds no wall and is left out. One entry a hollow sleeve that has a wall anywhere.
 *
 * @param channels vents and pins: their own sleeve's wall runs out to an edge at them, which is no thin wall
 * @param widened what each bore is drawn wider across because it prints narrower, mm: the wall is what it comes out as
 * @param at the node; the piece's placement says where its mesh lies about it
 */
export function measureWalls(
  piece: ShapedPiece,
  sleeves: readonly Sleeve[],
  channels: readonly Channel[],
  at: Vec3,
  widened: readonly number[] = [],
): MeasuredWall[] {
  const { positions, triangles, placement: m } = piece;
  // Into the print's axes: the transpose of the placement's rotation.
  const turn = (d: Vec3): Vec3 => [
    m[0]! * d[0] + m[4]! * d[1] + m[8]! * d[2],
    m[1]! * d[0] + m[5]! * d[1] + m[9]! * d[2],
    m[2]! * d[0] + m[6]! * d[1] + m[10]! * d[2],
  ];
  const node = turn([at[0] - m[3]!, at[1] - m[7]!, at[2] - m[11]!]);
  const balls = ballsOf(positions, triangles);
  const found: MeasuredWall[] = [];
  for (const [index, s] of sleeves.entries()) {
    if (!s.hollow) continue;
    const own = channels
      .filter((c) => c.sleeve === index)
      .map((c) => ({ from: add(node, turn(c.from)), direction: turn(c.direction), radius: c.radius }));
    const [d, y, z] = [turn(s.socket.direction), turn(s.socket.y), turn(s.socket.z)];
    const near = trianglesNear(balls, node, d, s.stop, s.mouth, 2 * largest(s.outer) + s.socket.wall);
    const wider = (widened[index] ?? 0) / 2;
    let best: MeasuredWall | null = null;
    for (const share of SHARES) {
      const along = share * s.socket.depth;
      const crossed = trianglesAcross(positions, triangles, near, d, dot(node, d) + s.stop + along);
      for (let k = 0; k < AZIMUTHS; k++) {
        const [start, out] = rayFrom(s, wider, k, addScaled(node, d, s.stop + along), y, z);
        const thickness = firstExit(positions, triangles, crossed, start, out);
        if (thickness === null || own.some((c) => onChannel(c, addScaled(start, out, thickness)))) continue;
        const printed = thickness + START + wider;
        if (!best || printed < best.thickness) best = { strut: s.socket.strut, thickness: printed, along };
      }
    }
    if (best) found.push(best);
  }
  return found;
}

function onChannel(c: Pick<Channel, 'from' | 'direction' | 'radius'>, p: Vec3): boolean {
  const away = subtract(p, c.from);
  return length(addScaled(away, c.direction, -dot(away, c.direction))) < c.radius + ON_CHANNEL;
}

/** mm; corners of the channel's polygon. */
const ON_CHANNEL = 0.1;

/** A start on the bore's surface and the direction out of it; of a rectangle, three rays a side. */
function rayFrom(s: Sleeve, wider: number, k: number, centre: Vec3, y: Vec3, z: Vec3): readonly [Vec3, Vec3] {
  if (typeof s.inner === 'number') {
    const angle = (2 * Math.PI * (k + 0.37)) / AZIMUTHS;
    const out = add(scale(y, Math.cos(angle)), scale(z, Math.sin(angle)));
    return [addScaled(centre, out, s.inner + wider + START), out];
  }
  const side = k % 4;
  const share = (Math.floor(k / 4) - 1) * 0.7;
  const [out, across] = side % 2 === 0 ? [y, z] : [z, y];
  const sense = side < 2 ? 1 : -1;
  const [half, other] = side % 2 === 0 ? [s.inner[0], s.inner[1]] : [s.inner[1], s.inner[0]];
  return [addScaled(addScaled(centre, across, share * other), out, sense * (half + wider + START)), scale(out, sense)];
}

/** Middle and reach of each triangle: x, y, z and the distance of its farthest corner, four numbers each. */
function ballsOf(p: Float32Array, t: Uint32Array): Float64Array {
  const balls = new Float64Array((t.length / 3) * 4);
  for (let i = 0, o = 0; i < t.length; i += 3, o += 4) {
    const [a, b, c] = [3 * t[i]!, 3 * t[i + 1]!, 3 * t[i + 2]!];
    let most = 0;
    for (let k = 0; k < 3; k++) balls[o + k] = (p[a + k]! + p[b + k]! + p[c + k]!) / 3;
    for (const at of [a, b, c])
      most = Math.max(
        most,
        (p[at]! - balls[o]!) ** 2 + (p[at + 1]! - balls[o + 1]!) ** 2 + (p[at + 2]! - balls[o + 2]!) ** 2,
      );
    balls[o + 3] = Math.sqrt(most);
  }
  return balls;
}

/** Triangles that come within `radius` of a stretch of a line. */
function trianglesNear(
  balls: Float64Array,
  node: Vec3,
  d: Vec3,
  from: number,
  to: number,
  radius: number,
): Uint32Array {
  const near: number[] = [];
  const [x, y, z] = addScaled(node, d, (from + to) / 2);
  for (let o = 0; o < balls.length; o += 4) {
    const reach = radius + (to - from) / 2 + balls[o + 3]!;
    const square = (balls[o]! - x) ** 2 + (balls[o + 1]! - y) ** 2 + (balls[o + 2]! - z) ** 2;
    if (square <= reach * reach) near.push((3 * o) / 4);
  }
  return Uint32Array.from(near);
}

/** Of those triangles, the ones that the plane `d · x = level` meets: all rays of one share run in it. */
function trianglesAcross(p: Float32Array, t: Uint32Array, near: Uint32Array, d: Vec3, level: number): Uint32Array {
  const height = (corner: number) => p[corner]! * d[0] + p[corner + 1]! * d[1] + p[corner + 2]! * d[2] - level;
  return near.filter((i) => {
    const [a, b, c] = [height(3 * t[i]!), height(3 * t[i + 1]!), height(3 * t[i + 2]!)];
    return Math.min(a, b, c) <= ON_PLANE && Math.max(a, b, c) >= -ON_PLANE;
  });
}

/** mm; single precision of the mesh and the round-off of the sum above, many times over. */
const ON_PLANE = 1e-3;

/** Distance along a ray to where it leaves the solid; null where it starts outside or never leaves. Möller and Trumbore 1997. */
function firstExit(p: Float32Array, t: Uint32Array, near: Uint32Array, start: Vec3, out: Vec3): number | null {
  let best = Number.POSITIVE_INFINITY;
  let leaves = false;
  for (const i of near) {
    const [a, b, c] = [3 * t[i]!, 3 * t[i + 1]!, 3 * t[i + 2]!];
    const [ex, ey, ez] = [p[b]! - p[a]!, p[b + 1]! - p[a + 1]!, p[b + 2]! - p[a + 2]!];
    const [fx, fy, fz] = [p[c]! - p[a]!, p[c + 1]! - p[a + 1]!, p[c + 2]! - p[a + 2]!];
    const [hx, hy, hz] = [out[1] * fz - out[2] * fy, out[2] * fx - out[0] * fz, out[0] * fy - out[1] * fx];
    const det = ex * hx + ey * hy + ez * hz;
    if (Math.abs(det) < 1e-12) continue;
    const [sx, sy, sz] = [start[0] - p[a]!, start[1] - p[a + 1]!, start[2] - p[a + 2]!];
    const u = (sx * hx + sy * hy + sz * hz) / det;
    if (u < 0 || u > 1) continue;
    const [qx, qy, qz] = [sy * ez - sz * ey, sz * ex - sx * ez, sx * ey - sy * ex];
    const v = (out[0] * qx + out[1] * qy + out[2] * qz) / det;
    if (v < 0 || u + v > 1) continue;
    const distance = (fx * qx + fy * qy + fz * qz) / det;
    if (distance <= 0 || distance >= best) continue;
    best = distance;
    // The triangle's outward normal e x f runs with the ray where it leaves: det = e · (out x f) = -out · (e x f).
    leaves = dot(out, [ey * fz - ez * fy, ez * fx - ex * fz, ex * fy - ey * fx]) > 0;
  }
  return leaves ? best : null;
}
