import { hubLimit, isWood, plasticLimit, woodLimit } from '../limits.js';
import type { Verdict } from '../standard.js';
import type { SocketCase, SocketPath } from './case.js';
import { bondSurface, engaged } from './geometry.js';
import { GLUE_FRACTURE, gluedRodCapacity } from './glued-rod.js';
import { sleeveChecks } from './sleeve.js';

/** Glued: the bond on the engaged perimeter carries tension and compression (the strut floats off the stop), then the sleeve. */
export const glued: SocketPath = (c) => {
  const { actions, rules, bond, strut, hub } = c;
  const surface = bondSurface(c);
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
  // The wood of a drilled body round the bore: its grain runs anyhow, so it is sheared across.
  const body = isWood(hub) ? hubLimit(hub, 'fv', actions.duration, rules) : null;
  if (body !== null && surface > 0)
    checks.push({
      utilisation: force / surface / body,
      rule: 'EN 1995-1-1 6.1.7, rolling shear of the drilled body at the socket bond',
    });
  const rod = gluedRod(c);
  if (rod !== null) checks.push({ utilisation: force / rod, rule: 'glued-in rod (Feligioni et al.), pull-out' });
  return surface > 0 || force === 0 ? [...checks, ...sleeveChecks(c)] : null;
};

/** What a round metal bar in a bored timber hub may carry, N: the mean pull-out of a glued-in rod with brittle glue over the factor; null for other pairs. */
function gluedRod(c: SocketCase): number | null {
  const { hub, strut, socket, rules } = c;
  const { shape } = socket.section;
  const metal = strut.family === 'steel' || strut.family === 'aluminium';
  if (!metal || !isWood(hub) || shape.kind === 'rectangle' || typeof socket.bore !== 'number') return null;
  const glue = Math.max(0, (socket.bore - shape.diameter) / 2);
  return gluedRodCapacity(shape.diameter, glue, engaged(c), hub.density, GLUE_FRACTURE.brittle) / rules.factor;
}
