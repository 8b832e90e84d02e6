import { add, cross, dot, length, normalise, scale, subtract, type Vec3 } from '../maths/vec3.js';

/** Nodes that move less than this share of the node that moves most stand still. */
const STILL = 1e-6;
/** A motion within this share of its size of a turn about an axis is called one. */
const FITS = 1e-6;
/** Standing neighbours that are tried in pairs as the axis of a swing. */
const PIVOTS = 30;
/** Marks that one sentence names; the rest are counted. */
const NAMED = 4;

/**
 * A mechanism in words: who moves, and about what where they move as one body. `shape` has three displacements a node.
 * Example: "N7 and N8 can swing about N3-N4".
 */
export function mechanismInWords(
  marks: readonly string[],
  at: readonly Vec3[],
  ends: ArrayLike<number>,
  shape: ArrayLike<number>,
): { readonly words: string; readonly nodes: readonly string[] } {
  const move = (i: number): Vec3 => [shape[3 * i], shape[3 * i + 1], shape[3 * i + 2]];
  const size = marks.map((_, i) => length(move(i)));
  const most = size.reduce((a, b) => Math.max(a, b), 0);
  const moving = marks.map((_, i) => i).filter((i) => size[i] > STILL * most);
  moving.sort((a, b) => size[b] - size[a] || a - b);
  const nodes = moving.map((i) => marks[i]);
  if (most === 0) return { words: 'nothing moves', nodes: [] };
  const who = list(nodes);
  const verb = (many: string): string => `${who} can ${many}`;
  const points = moving.map((i) => at[i]);
  const moves = moving.map(move);
  const still = neighboursOf(new Set(moving), ends);
  for (const a of still)
    for (const b of still)
      if (a < b && swings(points, moves, at[a], at[b]))
        return { words: verb(`swing about ${marks[a]}-${marks[b]}`), nodes };
  if (moving.length === 1) {
    const along = direction(normalise(moves[0]));
    return { words: verb(still.length === 1 ? `swing about ${marks[still[0]]}` : `move along ${along}`), nodes };
  }
  const motion = bodyMotion(points, moves);
  if (!motion) return { words: `${verb('move against the rest')}, ${nodes[0]} the most`, nodes };
  if (length(motion.turn) === 0)
    return { words: verb(`slide together along ${direction(normalise(moves[0]))}`), nodes };
  const axis = normalise(motion.turn);
  const pivot = still.find((i) => length(cross(subtract(at[i], motion.centre), motion.turn)) <= FITS * most);
  const about = pivot === undefined ? 'together about an axis' : `about ${marks[pivot]}, axis`;
  return { words: verb(`turn ${about} along ${direction(axis)}`), nodes };
}

/** Nodes that stand still at the other end of a moving node's bars. */
function neighboursOf(moving: ReadonlySet<number>, ends: ArrayLike<number>): number[] {
  const still = new Set<number>();
  for (let e = 0; e < ends.length; e += 2) {
    if (moving.has(ends[e]) && !moving.has(ends[e + 1])) still.add(ends[e + 1]);
    if (moving.has(ends[e + 1]) && !moving.has(ends[e])) still.add(ends[e]);
  }
  return [...still].sort((a, b) => a - b).slice(0, PIVOTS);
}

/** Whether all the moves are one turn about the line from a to b. */
function swings(points: readonly Vec3[], moves: readonly Vec3[], a: Vec3, b: Vec3): boolean {
  const axis = normalise(subtract(b, a));
  const arms = points.map((p) => cross(axis, subtract(p, a)));
  const reach = arms.reduce((sum, r) => sum + dot(r, r), 0);
  if (!(reach > 0)) return false;
  const turn = arms.reduce((sum, r, i) => sum + dot(r, moves[i]), 0) / reach;
  const most = moves.reduce((m, d) => Math.max(m, length(d)), 0);
  return turn !== 0 && arms.every((r, i) => length(subtract(scale(r, turn), moves[i])) <= FITS * most);
}

/** ω and a point of its axis with d = ω x (p - centre) for all points, or a plain slide (ω = 0); null where the points do not move as one. */
function bodyMotion(points: readonly Vec3[], moves: readonly Vec3[]): { turn: Vec3; centre: Vec3 } | null {
  const most = moves.reduce((m, d) => Math.max(m, length(d)), 0);
  if (moves.every((d) => length(subtract(d, moves[0])) <= FITS * most)) return { turn: [0, 0, 0], centre: points[0] };
  // d_i - d_0 = ω x (p_i - p_0): ω from the two arms that span most.
  let best: Vec3 | null = null;
  let bestSize = 0;
  for (let i = 1; i < Math.min(points.length, 200); i++)
    for (let j = i + 1; j < Math.min(points.length, 200); j++) {
      const [a, b] = [subtract(points[i], points[0]), subtract(points[j], points[0])];
      const [da, db] = [subtract(moves[i], moves[0]), subtract(moves[j], moves[0])];
      const area = length(cross(a, b));
      if (area <= bestSize) continue;
      bestSize = area;
      best = turnFrom(a, b, da, db);
    }
  if (best === null && points.length >= 2) {
    // Points on one line: the turn square to that line (a spin about it moves none of them).
    const a = subtract(points[1], points[0]);
    const da = subtract(moves[1], moves[0]);
    best = scale(cross(a, da), 1 / dot(a, a));
  }
  if (best === null) return null;
  const turn = best;
  if (length(turn) === 0) return null;
  // d_0 = ω x (p_0 - c): the part of d_0 along ω must vanish for a pure turn.
  const centre = add(points[0], scale(cross(turn, moves[0]), 1 / dot(turn, turn)));
  const fits = points.every((p, i) => length(subtract(cross(turn, subtract(p, centre)), moves[i])) <= 1e-5 * most);
  return fits ? { turn, centre } : null;
}

/** ω with ω x a = da and ω x b = db: from n = a x b, ω = (da x db)/(da . b) where that is not nought, else along the plane. */
function turnFrom(a: Vec3, b: Vec3, da: Vec3, db: Vec3): Vec3 {
  const n = cross(a, b);
  const nn = dot(n, n);
  // Components of ω on a, b, n from ω.(…) identities: (ω x a).b = ω.(a x b); (ω x a).n and (ω x b).n give the rest.
  const alongN = dot(da, b);
  const p = dot(da, n); // (ω x a).n = ω.(a x n)
  const q = dot(db, n); // (ω x b).n = ω.(b x n)
  // ω = x a + y b + z n; ω.(a x n) = y b.(a x n) = -y nn; ω.(b x n) = x a.(b x n) = x nn; ω.n = z nn.
  return add(add(scale(a, q / nn), scale(b, -p / nn)), scale(n, alongN / nn));
}

function direction(d: Vec3): string {
  const names = ['x', 'y', 'z'];
  for (let k = 0; k < 3; k++) if (Math.abs(Math.abs(d[k]) - 1) < 1e-6) return names[k];
  return `(${d.map((v) => (Math.abs(v) < 5e-4 ? 0 : v).toFixed(3)).join(', ')})`;
}

function list(marks: readonly string[]): string {
  if (marks.length === 1) return marks[0];
  if (marks.length <= NAMED) return `${marks.slice(0, -1).join(', ')} and ${marks[marks.length - 1]}`;
  return `${marks.slice(0, NAMED).join(', ')} and ${marks.length - NAMED} more nodes`;
}
