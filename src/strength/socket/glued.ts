import { plasticLimit, woodLimit } from '../limits.js';
import type { Verdict } from '../standard.js';
import type { SocketPath } from './case.js';
import { engaged, perimeter } from './geometry.js';
import { sleeveChecks } from './sleeve.js';

/** Glued: the bond on the engaged perimeter carries tension and compression (the strut floats off the stop), then the sleeve. */
export const glued: SocketPath = (c) => {
  const { actions, rules, bond, strut } = c;
  const surface = perimeter(c) * engaged(c);
  const force = Math.abs(actions.axial);
  const checks: Verdict[] = [];
  if (surface > 0) {
    checks.push({
      utilisation: force / surface / plasticLimit(bond, actions.duration, rules),
      rule: 'socket bond in shear',
    });
    const wood = woodLimit(strut, 'fv', actions.duration, rules);
    if (wood !== null)
      checks.push({ utilisation: force / surface / wood, rule: 'shear of the wood at the socket bond' });
  }
  return surface > 0 || force === 0 ? [...checks, ...sleeveChecks(c)] : null;
};
