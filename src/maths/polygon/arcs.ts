import type { Ring } from './ring.js';

/** A corner and the bulge of the side that leaves it: tan(a quarter of the arc's angle), positive anticlockwise, 0 straight. */
export interface BulgedCorner {
  readonly x: number;
  readonly y: number;
  readonly bulge: number;
}

/** Fewest chords that make an arc, and the largest angle that one of them may span, rad. */
const LEAST_CHORDS = 3;
const LARGEST_CHORD = Math.PI / 5;
/** Half a turn with the round-off of its chords. */
const HALF_TURN = Math.PI * (1 + 1e-9);

/**
 * The ring with runs of chords of one circle drawn together to arcs: every corner of a run within `tolerance` of the
 * circle through its first, middle and last corner, all chords turning the same way. A ring that is one circle
 * becomes two half circles. Arcs are split so that none passes half a turn.
 */
export function withArcs(ring: Ring, tolerance: number): BulgedCorner[] {
  const n = ring.length / 2;
  const p = (i: number): [number, number] => [ring[2 * (((i % n) + n) % n)]!, ring[2 * (((i % n) + n) % n) + 1]!];
  const whole = n >= 8 ? circleThrough(p(0), p(Math.floor(n / 3)), p(Math.floor((2 * n) / 3))) : null;
  if (whole && isRun(p, 0, n, whole, tolerance)) {
    const half = Math.floor(n / 2);
    const [a, b] = [p(0), p(half)];
    const first = sweep(p, 0, half, whole);
    const rest = sweep(p, half, n - half, whole);
    return [
      { x: a[0], y: a[1], bulge: Math.tan(first / 4) },
      { x: b[0], y: b[1], bulge: Math.tan(rest / 4) },
    ];
  }
  // Begin where no arc can run across: at a corner too sharp for one, or where a long side meets a short chord.
  let start = 0;
  let clearest = -1;
  for (let i = 0; i < n; i++) {
    const t = Math.abs(turnAt(p, i));
    const [before, after] = [sideLength(p, i - 1), sideLength(p, i)];
    const clear = t > LARGEST_CHORD ? 10 + t : Math.abs(Math.log(before / after));
    if (clear > clearest) {
      clearest = clear;
      start = i;
    }
  }
  const out: BulgedCorner[] = [];
  for (let i = 0; i < n; ) {
    let length = 0;
    let found: Circle | null = null;
    for (let k = LEAST_CHORDS; k <= n - i; k++) {
      const c = circleThrough(p(start + i), p(start + i + Math.floor(k / 2)), p(start + i + k));
      if (!c || !isRun(p, start + i, k, c, tolerance) || Math.abs(sweep(p, start + i, k, c)) > HALF_TURN) break;
      length = k;
      found = c;
    }
    const [x, y] = p(start + i);
    out.push({ x, y, bulge: found ? Math.tan(sweep(p, start + i, length, found) / 4) : 0 });
    i += Math.max(1, length);
  }
  return out;
}

interface Circle {
  readonly x: number;
  readonly y: number;
  readonly r: number;
}

type At = (i: number) => [number, number];

function circleThrough(a: readonly number[], b: readonly number[], c: readonly number[]): Circle | null {
  const [bx, by, cx, cy] = [b[0]! - a[0]!, b[1]! - a[1]!, c[0]! - a[0]!, c[1]! - a[1]!];
  const d = 2 * (bx * cy - by * cx);
  if (Math.abs(d) < 1e-12) return null;
  const x = (cy * (bx * bx + by * by) - by * (cx * cx + cy * cy)) / d;
  const y = (bx * (cx * cx + cy * cy) - cx * (bx * bx + by * by)) / d;
  return { x: a[0]! + x, y: a[1]! + y, r: Math.hypot(x, y) };
}

function isRun(p: At, first: number, chords: number, c: Circle, tolerance: number): boolean {
  let sign = 0;
  for (let k = 0; k <= chords; k++) {
    const [x, y] = p(first + k);
    if (Math.abs(Math.hypot(x - c.x, y - c.y) - c.r) > tolerance) return false;
    if (k === chords) break;
    const angle = chordAngle(p(first + k), p(first + k + 1), c);
    if (Math.abs(angle) > LARGEST_CHORD || angle === 0) return false;
    if (sign !== 0 && Math.sign(angle) !== sign) return false;
    sign = Math.sign(angle);
  }
  return true;
}

const chordAngle = (a: readonly number[], b: readonly number[], c: Circle): number => {
  const [ax, ay, bx, by] = [a[0]! - c.x, a[1]! - c.y, b[0]! - c.x, b[1]! - c.y];
  return Math.atan2(ax * by - ay * bx, ax * bx + ay * by);
};

function sweep(p: At, first: number, chords: number, c: Circle): number {
  let sum = 0;
  for (let k = 0; k < chords; k++) sum += chordAngle(p(first + k), p(first + k + 1), c);
  return sum;
}

const sideLength = (p: At, i: number): number => Math.hypot(p(i + 1)[0] - p(i)[0], p(i + 1)[1] - p(i)[1]);

function turnAt(p: At, i: number): number {
  const [a, b, c] = [p(i - 1), p(i), p(i + 1)];
  const [ux, uy, vx, vy] = [b[0] - a[0], b[1] - a[1], c[0] - b[0], c[1] - b[1]];
  return Math.atan2(ux * vy - uy * vx, ux * vx + uy * vy);
}
