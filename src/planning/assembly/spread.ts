import { addScaled, length, normalise, scale, type Vec3, ZERO } from '../../maths/vec3.js';

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
  const springs = struts.map(({ direction: [x, y, z], travel, aside }): Spring => ({ x, y, z, travel, aside }));
  const most = struts.reduce((m, s) => Math.max(m, s.travel), 0);
  const mean = struts.reduce<Vec3>((sum, s) => addScaled(sum, s.direction, 1), ZERO);
  let [x, y, z] = scale(length(mean) > 1e-9 ? normalise(mean) : (struts[0]?.direction ?? ZERO), -most);
  let value = cost(springs, x, y, z, Number.POSITIVE_INFINITY);
  let step = Math.max(most, 1e-6) * 2;
  // No cost lies below nought: a strut alone slides in from where the search would begin.
  for (let h = 0; h < HALVINGS && value > LEAST_GAIN; h++) {
    for (let moved = true; moved; ) {
      moved = false;
      for (let k = 0; k < PATTERN.length; k++) {
        const d = PATTERN[k]!;
        const nextX = x + d[0] * step;
        const nextY = y + d[1] * step;
        const nextZ = z + d[2] * step;
        const at = cost(springs, nextX, nextY, nextZ, value);
        if (at < value - LEAST_GAIN) {
          x = nextX;
          y = nextY;
          z = nextZ;
          value = at;
          moved = true;
        }
      }
    }
    step /= 2;
  }
  const each = springs.map((s) =>
    short(s, x, y, z) > 1e-3 * s.travel ? Number.POSITIVE_INFINITY : sideways(s, x, y, z) / s.aside,
  );
  return { ratio: each.reduce((m, r) => Math.max(m, r), 0), each, move: [x, y, z] };
}

/** A step counts when it gains more than round-off, as a share of what a strut is allowed. */
const LEAST_GAIN = 1e-12;

/** A strut with its direction in plain numbers: the search allocates nothing. */
interface Spring {
  readonly x: number;
  readonly y: number;
  readonly z: number;
  readonly travel: number;
  readonly aside: number;
}

/** |v - (v.d) d| */
function sideways(d: Spring, vx: number, vy: number, vz: number): number {
  const along = d.x * vx + d.y * vy + d.z * vz;
  const x = vx - d.x * along;
  const y = vy - d.y * along;
  const z = vz - d.z * along;
  return Math.sqrt(x * x + y * y + z * z);
}

const short = (d: Spring, vx: number, vy: number, vz: number): number =>
  Math.max(0, d.travel + (vx * d.x + vy * d.y + vz * d.z));

/** The cost of holding the hub at v; infinite as soon as it is known to reach `limit`. */
function cost(springs: readonly Spring[], vx: number, vy: number, vz: number, limit: number): number {
  let worst = 0;
  let missing = 0;
  for (let i = 0; i < springs.length; i++) {
    const s = springs[i]!;
    worst = Math.max(worst, sideways(s, vx, vy, vz) / s.aside);
    missing = Math.max(missing, short(s, vx, vy, vz));
    if (worst + PENALTY * missing >= limit) return Number.POSITIVE_INFINITY;
  }
  return worst + PENALTY * missing;
}

/** The 26 neighbours of a point in a cubic lattice: enough directions not to stall on the edges of a maximum. */
const PATTERN: readonly Vec3[] = [-1, 0, 1].flatMap((x) =>
  [-1, 0, 1].flatMap((y) => [-1, 0, 1].filter((z) => x !== 0 || y !== 0 || z !== 0).map((z): Vec3 => [x, y, z])),
);
