import { angleBetween } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import type { Socket } from '../../model/parts.js';
import { leastSetback } from './half-strip.js';
import { LEAST_WALL } from './printing.js';
import { leastOf, separations } from './prism-pair.js';
import { pathHalf } from './sleeve.js';

/** Two bores with less between them than the process prints. */
export interface NarrowWeb {
  readonly a: string;
  readonly b: string;
  /** mm; 0: the bores meet. */
  readonly web: number;
}

/** Halvings that find a web: to a thousandth of the least wall. */
const HALVINGS = 10;

/**
 * Pairs of sockets whose setbacks leave less web between their bores than the process's least wall: only a job's own gap asks for
 * that. The web is the largest for which the setbacks are still enough, by the rules that setbacks are found by.
 *
 * @param sockets with their setbacks; those without are left out
 */
export function narrowWebs(sockets: readonly Socket[], job: Job): NarrowWeb[] {
  const least = LEAST_WALL[job.nodes['process']];
  if (job.nodes.gap_mm === undefined || job.nodes.gap_mm >= least) return [];
  const found: NarrowWeb[] = [];
  sockets.forEach((a, i) => {
    for (const b of sockets.slice(i + 1)) {
      if (a.setback === null || b.setback === null) continue;
      const parts = partedBy(a, b);
      if (parts(least)) continue;
      let [low, high] = [0, least];
      for (let k = 0; k < HALVINGS; k++) {
        const middle = (low + high) / 2;
        if (parts(middle)) low = middle;
        else high = middle;
      }
      found.push({ a: a.strut, b: b.strut, web: low });
    }
  });
  return found;
}

/** Round-off of a setback, mm. */
const SAME = 1e-6;

/** Whether two sockets' setbacks leave a web of a thickness. */
function partedBy(a: Socket, b: Socket): (web: number) => boolean {
  const [ha, hb] = [pathHalf(a), pathHalf(b)];
  const [sa, sb] = [a.setback!, b.setback!];
  if (typeof ha === 'number' && typeof hb === 'number') {
    const angle = angleBetween(a.direction, b.direction);
    return (web) => sa >= leastSetback(angle, ha, hb, sb, web) - SAME;
  }
  const [pa, pb] = [
    { d: a.direction, u: a.y, v: a.z, half: ha },
    { d: b.direction, u: b.y, v: b.z, half: hb },
  ];
  return (web) => sa >= leastOf(separations(pa, pb, web), sb) - SAME;
}
