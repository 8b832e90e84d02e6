import { hubLimit, woodLimit } from '../limits.js';
import type { SocketPath } from './case.js';
import { stopArea } from './geometry.js';
import { sleeveChecks } from './sleeve.js';

/** Seated: the strut's end bears on the stop, without float; nothing holds it in tension. */
export const seated: SocketPath = (c) => {
  const { actions, rules, strut, hub } = c;
  if (actions.axial > 0) return null;
  const limits = [hubLimit(hub, 'fc', actions.duration, rules), woodLimit(strut, 'fc', actions.duration, rules)].filter(
    (l) => l !== null,
  );
  const pressed =
    limits.length > 0
      ? [{ utilisation: -actions.axial / stopArea(c) / Math.min(...limits), rule: 'bearing of the strut on its stop' }]
      : [];
  // The axial force goes through the stop, not through the sleeve.
  return [...pressed, ...sleeveChecks({ ...c, actions: { ...actions, axial: 0 } })];
};
