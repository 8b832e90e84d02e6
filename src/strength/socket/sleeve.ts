import { hubLimit, isWood, woodLimit } from '../limits.js';
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
  const checks: Verdict[] = [];
  const moment = Math.hypot(actions.momentY, actions.momentZ);
  const along = hubLimit(hub, actions.axial >= 0 ? 'ftZ' : 'fc', duration, rules);
  const bent = hubLimit(hub, 'ftZ', duration, rules) ?? along;
  if (along !== null && bent !== null)
    checks.push({
      utilisation: Math.abs(actions.axial) / area / along + moment / sleeve(c).modulus / bent,
      rule: isWood(hub)
        ? `EN 1995-1-1 6.1.3, net section of the drilled body, ${actions.axial >= 0 ? 'tension' : 'compression'} across the grain${moment > 0 ? ' with bending' : ''}`
        : `socket wall ${actions.axial >= 0 ? 'tension across layers' : 'compression'}${moment > 0 ? ' with bending' : ''}`,
    });
  if (moment > 0) {
    const pressure = (6 * moment) / (acrossPin(c) * engaged(c) ** 2);
    const plastic = hubLimit(hub, 'fc', duration, rules);
    const wood = woodLimit(strut, 'fc90', duration, rules);
    if (!Number.isFinite(pressure)) return checks;
    if (plastic !== null)
      checks.push({ utilisation: pressure / plastic, rule: 'bearing of the strut on its socket under bending' });
    if (wood !== null)
      checks.push({
        utilisation: pressure / wood,
        rule: 'EN 1995-1-1 6.1.5 (6.3), bearing of the socket on the strut',
      });
  }
  return checks;
}
