import { plasticLimit, woodLimit } from '../limits.js';
import type { Verdict } from '../standard.js';
import type { SocketCase } from './case.js';
import { acrossPin, engaged, sleeve } from './geometry.js';

/**
 * The printed sleeve at its root: N / A + M / W against the strength across layers, whatever way it is printed.
 * A moment is held by the pressure of the strut on the bore, linear along the engaged length L: p = 6 M / (d L²), which must not crush plastic or wood.
 */
export function sleeveChecks(c: SocketCase, area = sleeve(c).area): Verdict[] {
  const { actions, hub, rules, strut } = c;
  const { duration } = actions;
  const strength = actions.axial >= 0 ? (hub.strength['ftZ'] ?? hub.strength['ft']) : hub.strength['fc'];
  const checks: Verdict[] = [];
  const moment = Math.hypot(actions.momentY, actions.momentZ);
  if (strength !== undefined) {
    const bent = hub.strength['ftZ'] ?? strength;
    checks.push({
      utilisation:
        Math.abs(actions.axial) / area / plasticLimit(strength, duration, rules) +
        moment / sleeve(c).modulus / plasticLimit(bent, duration, rules),
      rule: `socket wall ${actions.axial >= 0 ? 'tension across layers' : 'compression'}${moment > 0 ? ' with bending' : ''}`,
    });
  }
  if (moment > 0) {
    const pressure = (6 * moment) / (acrossPin(c) * engaged(c) ** 2);
    const limits = [
      hub.strength['fc'] === undefined ? null : plasticLimit(hub.strength['fc'], duration, rules),
      woodLimit(strut, 'fc90', duration, rules),
    ].filter((l) => l !== null);
    if (limits.length > 0 && Number.isFinite(pressure))
      checks.push({
        utilisation: pressure / Math.min(...limits),
        rule: 'bearing of the strut in its socket under bending',
      });
  }
  return checks;
}
