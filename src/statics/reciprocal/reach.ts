import { dotOf } from '../../maths/least-squares.js';
import { seededRandom } from '../../maths/random.js';
import type { QuadraticForces } from './quadratic-forces.js';

/** A remainder below this share of a state's length adds no new direction. */
const NEW_DIRECTION = 1e-7;
/** Multiplications that the count may cost: about four seconds. Beyond, it is not made. */
const MOST_WORK = 4e9;

/**
 * How many independent states of force the diagrams span: the dimension of the linear hull of t(x), a cone of its own. Random
 * diagrams span it with probability one. At most `most` (the self-stress states); null where the count would cost too much.
 */
export function reachedStates(q: QuadraticForces, most: number): number | null {
  const samples = Math.min((q.size * (q.size + 1)) / 2, most + 1);
  if (samples * samples * q.edges > MOST_WORK) return null;
  const random = seededRandom(3);
  const found: Float64Array[] = [];
  for (let i = 0; i < samples; i++) {
    const a = q.gradients(Float64Array.from({ length: q.size }, () => random() - 0.5));
    const t = q.polarised(a, a);
    const before = Math.sqrt(dotOf(t, t));
    for (let twice = 0; twice < 2; twice++) {
      for (const v of found) {
        const c = dotOf(v, t);
        for (let e = 0; e < t.length; e++) t[e] -= c * v[e];
      }
    }
    const left = Math.sqrt(dotOf(t, t));
    if (left > NEW_DIRECTION * before) found.push(t.map((v) => v / left));
  }
  return found.length;
}
