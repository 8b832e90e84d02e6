import { plasticLimit, woodLimit } from '../limits.js';
import type { SocketPath } from './case.js';
import { strutArea } from './geometry.js';
import { sleeveChecks } from './sleeve.js';

/** Seated: the strut's end bears on the stop, without float; nothing holds it in tension. */
export const seated: SocketPath = (c) => {
  const { actions, rules, strut, hub } = c;
  if (actions.axial > 0) return null;
  const limits = [
    hub.strength['fc'] === undefined ? null : plasticLimit(hub.strength['fc'], actions.duration, rules),
    woodLimit(strut, 'fc', actions.duration, rules),
  ].filter((l) => l !== null);
  const pressed =
    limits.length > 0
      ? [{ utilisation: -actions.axial / strutArea(c) / Math.min(...limits), rule: 'bearing of the strut on its stop' }]
      : [];
  // The axial force goes through the stop, not through the sleeve.
  return [...pressed, ...sleeveChecks({ ...c, actions: { ...actions, axial: 0 } })];
};
