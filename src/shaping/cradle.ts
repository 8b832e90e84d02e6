import { grow, type Half, largest, outlineOf, type Sleeve } from '../detailing/systems/sleeve.js';
import { add, addScaled, cross, dot, scale, type Vec3 } from '../maths/vec3.js';
import type { HubSpace } from './hub-space.js';
import type { Bench, Manifold } from './kernel.js';
import { MeshBuilder } from './mesh-builder.js';
import { placedAlong, sidesFor } from './placed.js';

/** A sleeve that is open on one side, so that a strut can be laid in; a cap closes it. */
export interface Cradle {
  readonly sleeve: number;
  /** Unit vector square to the strut, out of the opening. */
  readonly side: Vec3;
  /** The side as an angle about the strut, and half the angle that the opening takes up, rad. */
  readonly angle: number;
  readonly halfAngle: number;
  /** Where a tie round sleeve and cap lies, from and to along the strut, mm; null where the wall is too thin for a groove. */
  readonly groove: { readonly from: number; readonly to: number; readonly depth: number } | null;
}

/** The opening is this much wider than the bore, and the cap this much narrower than the opening, mm a side. */
const [WIDER, CAP_PLAY] = [0.05, 0.15] as const;
/** Cap over strut, mm. */
const CAP_OVER = 0.1;
/** The cap of a round sleeve ends above the strut's middle by this share of the radius: below it would run out to an edge. */
const CAP_FOOT = 0.35;
/** A cable tie, mm: 2.5 wide; common practice, no source. */
const [TIE, TIE_DEPTH] = [3.2, 0.8] as const;
const SIDES = 24;

/**
 * The side towards which a sleeve can open: clear of every other strut's path and its least wall over the strut's whole width, so
 * that the opening may take of the body and of a neighbour's cone; most nearly `towards`. null: none.
 */
export function cradleOf(
  space: HubSpace,
  index: number,
  towards: Vec3,
  chamfer: number,
  leastWall: number,
): Cradle | null {
  const s = space.sleeves[index]!;
  const count = typeof s.inner === 'number' ? SIDES : 4;
  let best: Cradle | null = null;
  let most = Number.NEGATIVE_INFINITY;
  for (let k = 0; k < count; k++) {
    const angle = (2 * Math.PI * k) / count;
    const side = add(scale(s.socket.y, Math.cos(angle)), scale(s.socket.z, Math.sin(angle)));
    const score = dot(side, towards);
    if (score <= most + 1e-9 || !isOpen(space, index, side, acrossOf(s, angle), leastWall)) continue;
    most = score;
    const to = s.mouth - chamfer - 0.6;
    const depth = Math.min(TIE_DEPTH, s.socket.wall - leastWall);
    best = {
      sleeve: index,
      side,
      angle,
      halfAngle:
        typeof s.inner === 'number' && typeof s.outer === 'number'
          ? Math.asin(Math.min(1, (s.inner + WIDER) / s.outer)) + 0.15
          : Math.PI / 4 - 0.1,
      groove: depth > 0.25 && to - TIE > s.coneTop + 1 ? { from: to - TIE, to, depth } : null,
    };
  }
  return best;
}

/** Half-width of the bore across an opening. */
const acrossOf = (s: Sleeve, angle: number): number =>
  typeof s.inner === 'number' ? s.inner : Math.abs(Math.cos(angle)) > 0.5 ? s.inner[1] : s.inner[0];

function isOpen(space: HubSpace, index: number, side: Vec3, across: number, web: number): boolean {
  const s = space.sleeves[index]!;
  const u = cross(s.socket.direction, side);
  for (let t = s.stop + 0.3; t <= space.reach + 1; t += 1.5)
    for (let v = 0; v <= 2 * space.reach; v += 1.5)
      for (const w of [-1, -0.5, 0, 0.5, 1]) {
        const p = addScaled(addScaled(scale(s.socket.direction, t), side, v), u, w * across);
        if (!space.clearOfPaths(p, web, index)) return false;
      }
  return true;
}

/** What is cut from the hub: the opening, and the tie's groove round the sleeve. */
export function cradleCutters(bench: Bench, space: HubSpace, c: Cradle): Manifold[] {
  const s = space.sleeves[c.sleeve]!;
  const half = acrossOf(s, c.angle) + WIDER;
  const slot = block(bench, s, c, s.stop, space.reach + 1, half, 0, 2 * space.reach);
  const groove = grooveSolid(bench, s, c);
  return groove ? [slot, groove] : [slot];
}

/** The cap that fills the opening over the strut, relative to the node. */
export function capSolid(bench: Bench, space: HubSpace, c: Cradle): Manifold {
  const { Manifold } = bench.kernel;
  const s = space.sleeves[c.sleeve]!;
  const half = acrossOf(s, c.angle) + WIDER - CAP_PLAY;
  const n = sidesFor(largest(s.outer));
  const outside = loft(bench, s, s.stop + 0.3, s.mouth, s.outer, n);
  const strut = loft(bench, s, s.stop - 1, s.mouth + 1, grow(s.inner, CAP_OVER), n);
  const foot =
    typeof s.inner === 'number'
      ? CAP_FOOT * s.inner
      : (Math.abs(Math.cos(c.angle)) > 0.5 ? s.inner[0] : s.inner[1]) + CAP_OVER;
  const window = block(bench, s, c, s.stop, s.mouth + 2, half, foot, 2 * largest(s.cone) + 2);
  const kept = bench.hold(Manifold.intersection([outside, window]), 'cap');
  const groove = grooveSolid(bench, s, c);
  const cap = bench.hold(Manifold.difference([kept, strut, ...(groove ? [groove] : [])]), 'cap');
  for (const solid of [outside, strut, window, kept, ...(groove ? [groove] : [])]) bench.free(solid);
  return cap;
}

function grooveSolid(bench: Bench, s: Sleeve, c: Cradle): Manifold | null {
  if (!c.groove) return null;
  const n = sidesFor(largest(s.outer));
  const ring = loft(bench, s, c.groove.from, c.groove.to, grow(s.outer, 3), n);
  const left = loft(bench, s, c.groove.from - 1, c.groove.to + 1, grow(s.outer, -c.groove.depth), n);
  const groove = bench.hold(bench.kernel.Manifold.difference([ring, left]), 'groove');
  bench.free(ring);
  bench.free(left);
  return groove;
}

function loft(bench: Bench, s: Sleeve, from: number, to: number, half: Half, sides: number): Manifold {
  const mesh = new MeshBuilder();
  const outline = outlineOf(half, sides);
  mesh.loft([
    { z: from, outline },
    { z: to, outline },
  ]);
  return placedAlong(bench, mesh, s, 'cradle');
}

/** A block over the opening: `half` wide to either side, from `low` to `high` along the side. */
function block(
  bench: Bench,
  s: Sleeve,
  c: Cradle,
  from: number,
  to: number,
  half: number,
  low: number,
  high: number,
): Manifold {
  const [cos, sin] = [Math.cos(c.angle), Math.sin(c.angle)];
  const corner = (v: number, u: number): [number, number] => [v * cos - u * sin, v * sin + u * cos];
  const outline = [corner(low, -half), corner(high, -half), corner(high, half), corner(low, half)];
  const mesh = new MeshBuilder();
  // The fan's middle must lie inside the block: rings are lofted about the block's own middle.
  const middle = corner((low + high) / 2, 0);
  mesh.loft(
    [
      { z: from, outline },
      { z: to, outline },
    ],
    middle,
  );
  return placedAlong(bench, mesh, s, 'opening');
}
