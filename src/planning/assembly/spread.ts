import { addScaled, dot, length, normalise, scale, type Vec3, ZERO } from '../../maths/vec3.js';

/** A strut between a loose hub and a standing one, as the spreading sees it. */
export interface SpringStrut {
  /** Unit vector from the loose hub to the standing one. */
  readonly direction: Vec3;
  /** How far the hub must draw back along the strut before the strut's end can enter, mm. */
  readonly travel: number;
  /** How far the strut's end may stand aside, mm: by its bending and the socket's play. */
  readonly aside: number;
}

export interface Spread {
  /** Largest share of its allowed sideways movement that any strut needs; at most 1 means that it goes in. */
  readonly ratio: number;
  /** The same by strut. */
  readonly each: readonly number[];
  /** Where the hub is held while the struts enter, from its final place, mm. */
  readonly move: Vec3;
}

/** Halvings of the search's step: from the largest travel to a thousandth of it. */
const HALVINGS = 10;
const PENALTY = 1e3;

/**
 * min over v of max over i of |v - (v.d_i) d_i| / aside_i, subject to v.d_i <= -travel_i: where to hold a loose hub so
 * that all its struts can enter the hubs that stand. A pattern search over the convex function with an exact penalty
 * (Hooke and Jeeves, J. ACM 8(2), 1961), from the mean of the directions. With one strut the ratio is 0: it slides in.
 */
export function spread(struts: readonly SpringStrut[]): Spread {
  const most = struts.reduce((m, s) => Math.max(m, s.travel), 0);
  const mean = struts.reduce<Vec3>((sum, s) => addScaled(sum, s.direction, 1), ZERO);
  let best = scale(length(mean) > 1e-9 ? normalise(mean) : (struts[0]?.direction ?? ZERO), -most);
  let value = cost(struts, best);
  let step = Math.max(most, 1e-6) * 2;
  for (let h = 0; h < HALVINGS; h++) {
    for (let moved = true; moved; ) {
      moved = false;
      for (const d of PATTERN) {
        const next = addScaled(best, d, step);
        const at = cost(struts, next);
        if (at < value - 1e-12) {
          [best, value, moved] = [next, at, true];
        }
      }
    }
    step /= 2;
  }
  const each = struts.map((s) =>
    short(s, best) > 1e-3 * s.travel ? Number.POSITIVE_INFINITY : sideways(s, best) / s.aside,
  );
  return { ratio: each.reduce((m, r) => Math.max(m, r), 0), each, move: best };
}

/** |v - (v.d) d| */
function sideways({ direction: d }: SpringStrut, v: Vec3): number {
  const along = d[0] * v[0] + d[1] * v[1] + d[2] * v[2];
  const x = v[0] - d[0] * along;
  const y = v[1] - d[1] * along;
  const z = v[2] - d[2] * along;
  return Math.sqrt(x * x + y * y + z * z);
}
const short = (s: SpringStrut, v: Vec3): number => Math.max(0, s.travel + dot(v, s.direction));

function cost(struts: readonly SpringStrut[], v: Vec3): number {
  let worst = 0;
  let missing = 0;
  for (const s of struts) {
    worst = Math.max(worst, sideways(s, v) / s.aside);
    missing = Math.max(missing, short(s, v));
  }
  return worst + PENALTY * missing;
}

/** The 26 neighbours of a point in a cubic lattice: enough directions not to stall on the edges of a maximum. */
const PATTERN: readonly Vec3[] = [-1, 0, 1].flatMap((x) =>
  [-1, 0, 1].flatMap((y) => [-1, 0, 1].filter((z) => x !== 0 || y !== 0 || z !== 0).map((z): Vec3 => [x, y, z])),
);
