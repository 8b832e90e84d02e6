import { addScaled, cross, dot, length, normalise, perpendicular, subtract, type Vec3, ZERO } from './vec3.js';

/** Share of the loop's size below which a point lies on a line: rounding of coordinates exported with 9 digits. */
const TOUCH = 1e-9;

/**
 * How a closed loop of points in space fails to be a simple polygon in its plane: `straight` where all points lie on one
 * line, `crossing` where two edges cross, touch or fold back on each other; null where it is simple.
 * The plane is square to the loop's vector area (Newell; Sutherland et al., ACM Computing Surveys 6(1), 1974); a
 * figure of eight may have none, so then to the widest triangle at the first point. O(n²) for n points.
 */
export function loopFailure(points: readonly Vec3[]): 'straight' | 'crossing' | null {
  const size = Math.max(0, ...points.map((p) => length(subtract(p, points[0]!))));
  const normal = normalOf(points, size);
  if (!normal) return 'straight';
  const x = perpendicular(normal);
  const y = cross(normal, x);
  const flat = points.map((p): Point => [dot(p, x) / size, dot(p, y) / size]);
  const n = flat.length;
  for (let i = 0; i < n; i++) {
    const [a, b] = [flat[i]!, flat[(i + 1) % n]!];
    if (foldsBack(a, b, flat[(i + 2) % n]!)) return 'crossing';
    for (let j = i + 2; j < n; j++) {
      if (i === 0 && j === n - 1) continue;
      if (meet(a, b, flat[j]!, flat[(j + 1) % n]!)) return 'crossing';
    }
  }
  return null;
}

type Point = readonly [number, number];

function normalOf(points: readonly Vec3[], size: number): Vec3 | null {
  const from = points[0]!;
  let area: Vec3 = ZERO;
  let widest: Vec3 = ZERO;
  for (let i = 1; i < points.length; i++) {
    const spoke = subtract(points[i]!, from);
    if (i + 1 < points.length) area = addScaled(area, cross(spoke, subtract(points[i + 1]!, from)), 1);
  }
  const far = points.reduce((best, p) => {
    const spoke = subtract(p, from);
    return length(spoke) > length(best) ? spoke : best;
  }, ZERO);
  for (const p of points) {
    const c = cross(far, subtract(p, from));
    if (length(c) > length(widest)) widest = c;
  }
  if (length(widest) <= TOUCH * size * size) return null;
  return normalise(length(area) > 1e-6 * size * size ? area : widest);
}

/** Twice the area of a, b, c: positive where they run anticlockwise. */
const turn = (a: Point, b: Point, c: Point): number => (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0]);

const foldsBack = (a: Point, b: Point, c: Point): boolean =>
  Math.abs(turn(a, b, c)) <= TOUCH && (b[0] - a[0]) * (c[0] - b[0]) + (b[1] - a[1]) * (c[1] - b[1]) < 0;

function meet(a: Point, b: Point, c: Point, d: Point): boolean {
  const [abc, abd, cda, cdb] = [turn(a, b, c), turn(a, b, d), turn(c, d, a), turn(c, d, b)];
  if (Math.abs(abc) <= TOUCH && between(a, b, c)) return true;
  if (Math.abs(abd) <= TOUCH && between(a, b, d)) return true;
  if (Math.abs(cda) <= TOUCH && between(c, d, a)) return true;
  if (Math.abs(cdb) <= TOUCH && between(c, d, b)) return true;
  return abc * abd < 0 && cda * cdb < 0;
}

function between(a: Point, b: Point, p: Point): boolean {
  const along = (p[0] - a[0]) * (b[0] - a[0]) + (p[1] - a[1]) * (b[1] - a[1]);
  const whole = (b[0] - a[0]) ** 2 + (b[1] - a[1]) ** 2;
  return along >= -TOUCH && along <= whole + TOUCH;
}
