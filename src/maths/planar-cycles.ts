import { loopFailure } from './loop-crossing.js';
import { addScaled, cross, dot, length, normalise, subtract, type Vec3 } from './vec3.js';

/** Two edges at a point span no plane where the sine of their angle is below this: a straight run. */
const STRAIGHT = 1e-3;

/**
 * Minimal cycles of a graph in space that lie in one plane each, every one once, as loops of point indices that begin at their
 * least index: for each plane that two edges at a point span, the connected edges in that plane are walked round, always
 * turning the same way, which gives the bounded faces of a plane drawing (de Berg et al., Computational Geometry, 2008, 2.2).
 * A cycle with another of the plane's points inside is not minimal, one that crosses itself is no face: both are left out.
 * `flat`: how far, as a share of the distance from the first point, an edge's end may be out of the plane.
 */
export function planarCycles(
  points: readonly Vec3[],
  edges: readonly (readonly [number, number])[],
  flat: number,
): number[][] {
  const neighbours: number[][] = points.map(() => []);
  for (const [a, b] of edges) {
    neighbours[a]!.push(b);
    neighbours[b]!.push(a);
  }
  for (const list of neighbours) list.sort((a, b) => a - b);
  const done = new Set<string>();
  const found = new Map<string, number[]>();
  points.forEach((_, centre) => {
    const around = neighbours[centre]!;
    for (let i = 0; i < around.length; i++)
      for (let j = i + 1; j < around.length; j++) {
        const [a, b] = [around[i]!, around[j]!];
        if (done.has(`${centre} ${a} ${b}`)) continue;
        const normal = cross(direction(points, centre, a), direction(points, centre, b));
        if (length(normal) < STRAIGHT) continue;
        const part = coplanarPart(points, neighbours, centre, normalise(normal), flat);
        for (const [at, others] of part)
          for (const p of others) for (const q of others) if (p < q) done.add(`${at} ${p} ${q}`);
        for (const loop of facesOf(points, part, normalise(normal))) {
          const key = [...loop].sort((x, y) => x - y).join(' ');
          if (!found.has(key)) found.set(key, loop);
        }
      }
  });
  return [...found.values()].sort(compareLoops);
}

const direction = (points: readonly Vec3[], a: number, b: number): Vec3 => normalise(subtract(points[b]!, points[a]!));

function compareLoops(a: readonly number[], b: readonly number[]): number {
  for (let k = 0; k < Math.min(a.length, b.length); k++) if (a[k] !== b[k]) return a[k]! - b[k]!;
  return a.length - b.length;
}

/** Points that are reached from `start` along edges in the plane, each with its neighbours in the plane. */
function coplanarPart(
  points: readonly Vec3[],
  neighbours: readonly (readonly number[])[],
  start: number,
  normal: Vec3,
  flat: number,
): Map<number, number[]> {
  const part = new Map<number, number[]>();
  const inPlane = (i: number): boolean => {
    const spoke = subtract(points[i]!, points[start]!);
    return Math.abs(dot(normal, spoke)) <= flat * length(spoke);
  };
  const queue = [start];
  part.set(start, []);
  for (let at = queue.pop(); at !== undefined; at = queue.pop())
    for (const next of neighbours[at]!) {
      if (!inPlane(next)) continue;
      part.get(at)!.push(next);
      if (!part.has(next)) {
        part.set(next, []);
        queue.push(next);
      }
    }
  return part;
}

/** Bounded faces of the plane drawing, dead ends first taken off. */
function facesOf(points: readonly Vec3[], whole: ReadonlyMap<number, readonly number[]>, normal: Vec3): number[][] {
  const part = withoutDeadEnds(whole);
  const [x, y] = axesIn(normal);
  const flat = (i: number): readonly [number, number] => [dot(points[i]!, x), dot(points[i]!, y)];
  const around = new Map<number, number[]>();
  for (const [at, list] of part) {
    const [px, py] = flat(at);
    const angle = (i: number): number => Math.atan2(flat(i)[1] - py, flat(i)[0] - px);
    around.set(
      at,
      [...list].sort((a, b) => angle(a) - angle(b) || a - b),
    );
  }
  const walked = new Set<string>();
  const faces: number[][] = [];
  for (const from of [...part.keys()].sort((a, b) => a - b))
    for (const to of part.get(from)!) {
      if (walked.has(`${from} ${to}`)) continue;
      const loop: number[] = [];
      let [a, b] = [from, to];
      while (!walked.has(`${a} ${b}`)) {
        walked.add(`${a} ${b}`);
        loop.push(a);
        const list = around.get(b)!;
        // The edge next clockwise after the one that was come by: the face lies on the left.
        const next = list[(list.indexOf(a) + list.length - 1) % list.length]!;
        [a, b] = [b, next];
      }
      if (new Set(loop).size === loop.length && areaOf(loop.map(flat)) > 0 && isFace(points, loop, part, flat))
        faces.push(fromLeast(loop));
    }
  return faces;
}

function withoutDeadEnds(whole: ReadonlyMap<number, readonly number[]>): Map<number, number[]> {
  const part = new Map([...whole].map(([at, list]) => [at, [...list]]));
  const ends = [...part.keys()].filter((at) => part.get(at)!.length < 2);
  for (let at = ends.pop(); at !== undefined; at = ends.pop()) {
    for (const other of part.get(at) ?? []) {
      const left = part.get(other)!.filter((i) => i !== at);
      part.set(other, left);
      if (left.length === 1) ends.push(other);
    }
    part.delete(at);
  }
  return part;
}

type Flat = (i: number) => readonly [number, number];

function isFace(
  points: readonly Vec3[],
  loop: readonly number[],
  part: ReadonlyMap<number, unknown>,
  flat: Flat,
): boolean {
  if (loop.length < 3 || loopFailure(loop.map((i) => points[i]!)) !== null) return false;
  const corners = new Set(loop);
  const outline = loop.map(flat);
  for (const at of part.keys()) if (!corners.has(at) && inside(flat(at), outline)) return false;
  return true;
}

/** Crossing number of a ray (Shimrat, Comm. ACM 5(8), 1962). */
function inside([x, y]: readonly [number, number], outline: readonly (readonly [number, number])[]): boolean {
  let within = false;
  outline.forEach(([ax, ay], k) => {
    const [bx, by] = outline[(k + 1) % outline.length]!;
    if (ay > y !== by > y && x < ((bx - ax) * (y - ay)) / (by - ay) + ax) within = !within;
  });
  return within;
}

function areaOf(outline: readonly (readonly [number, number])[]): number {
  let twice = 0;
  outline.forEach(([ax, ay], k) => {
    const [bx, by] = outline[(k + 1) % outline.length]!;
    twice += ax * by - bx * ay;
  });
  return twice / 2;
}

function axesIn(normal: Vec3): readonly [Vec3, Vec3] {
  const helper: Vec3 = Math.abs(normal[0]) < 0.6 ? [1, 0, 0] : [0, 1, 0];
  const x = normalise(addScaled(helper, normal, -dot(helper, normal)));
  return [x, cross(normal, x)];
}

/** The same loop from its least index on, towards the lesser of that one's two neighbours. */
function fromLeast(loop: readonly number[]): number[] {
  const at = loop.indexOf(Math.min(...loop));
  const turned = [...loop.slice(at), ...loop.slice(0, at)];
  return turned[1]! <= turned.at(-1)! ? turned : [turned[0]!, ...turned.slice(1).reverse()];
}
