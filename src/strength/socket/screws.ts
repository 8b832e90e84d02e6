import { hubLimit } from '../limits.js';
import type { Verdict } from '../standard.js';
import type { SocketCase } from './case.js';
import { engaged } from './geometry.js';

/**
 * The screws of a clamp, which alone keep its halves together. Derived here: a strut pulls one half off the other by the part of its
 * force and its shear that is square to the parting plane, and prises them apart by a moment, which it passes to the two halves by
 * pressures that grow linearly along the engaged length L: a resultant of 1.5 M / L each. Every screw takes its even share; its
 * thread shears out of the plastic, and its head bears on it.
 */
export function screwChecks(c: SocketCase): Verdict[] {
  const screws = c.passes?.screws;
  if (!screws || screws.count === 0) return [];
  const { actions, hub, rules } = c;
  const across = Math.sqrt(Math.max(0, 1 - screws.out ** 2));
  const moment = Math.hypot(actions.momentY, actions.momentZ);
  const length = engaged(c);
  const prised = length > 0 ? (1.5 * moment) / length : 0;
  // Compression closes the halves; shear may run either way.
  const apart =
    Math.max(0, actions.axial) * screws.out + (Math.hypot(actions.shearY, actions.shearZ) + prised) * across;
  if (apart === 0) return [];
  const each = apart / screws.count;
  const checks: Verdict[] = [];
  const shear = hubLimit(hub, 'fv', actions.duration, rules);
  if (shear !== null)
    checks.push({ utilisation: each / (screws.threadArea * shear), rule: 'screws of the clamp, thread shearing out' });
  const crush = hubLimit(hub, 'fc', actions.duration, rules);
  if (crush !== null)
    checks.push({ utilisation: each / (screws.headArea * crush), rule: 'screws of the clamp, bearing of the head' });
  return checks;
}
