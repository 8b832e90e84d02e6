import { PIN_STEEL } from '../../model/catalogue/pin.js';
import { GAMMA_M_CONNECTION, kMod } from '../../model/catalogue/timber-factors.js';
import type { BoltedEnd } from '../../model/parts.js';
import { plateInTheMiddle, yieldMoment } from '../en1995/joint/double-shear.js';
import { embeddingAtAngle, embeddingStrength } from '../en1995/joint/embedding.js';
import { effectiveNumber, leastDistances } from '../en1995/joint/row.js';
import { splittingCapacity } from '../en1995/joint/splitting.js';
import { hubLimit, woodLimit } from '../limits.js';
import type { Verdict } from '../standard.js';
import type { SocketCase, SocketPath } from './case.js';
import { strutArea } from './geometry.js';

/** A bolt's hole is 1 mm wider at most, EN 1995-1-1 10.4.3 (1). */
const HOLE_OVER = 1;

/**
 * A slotted timber end bolted to a plate of the hub, in tension or compression: bolts in double shear EN 1995-1-1 8.2.3 (8.11) with
 * nef of 8.5.1.1 (8.34), the spacings of table 8.4, in tension the net section of 5.2 and the plate's own net section and tear-out;
 * shear across the grain and the turning of the row by 8.1.4; bending of the plate.
 */
export const bolted: SocketPath = (c) => {
  const end = c.socket.bolted!;
  const { shape } = c.socket.section;
  if (shape.kind !== 'rectangle') return null;
  const { actions, hub, strut, rules } = c;
  const [through, depth] = end.along === 'y' ? [shape.width, shape.height] : [shape.height, shape.width];
  const timber = (through - end.slot) / 2;
  const force = Math.abs(actions.axial);
  if (end.bolts < 1 || end.diameter <= 0 || timber <= 0) return force === 0 ? [] : null;
  const alongY = end.along === 'y';
  // About the bolts' own axis the row turns the strut by forces across the grain; about the other axis the plate bends.
  const arm = (end.bolts - 1) * end.spacing;
  const turning = alongY ? actions.momentY : actions.momentZ;
  const turn = turning > 0 && arm > 0 ? turning / arm : 0;
  const bending = alongY ? actions.momentZ : actions.momentY;
  const across = Math.abs(alongY ? actions.shearZ : actions.shearY) + turn;
  const factor = kMod(rules.serviceClass, actions.duration) / GAMMA_M_CONNECTION;
  const checks: Verdict[] = [];
  const push = (utilisation: number, rule: string): void => void checks.push({ utilisation, rule });

  // As if every bolt had the largest share across the grain: exact for two, safe for more.
  const pull = Math.hypot(force, end.bolts * across);
  push(
    pull / (boltCapacity(c, end, timber, Math.atan2(end.bolts * across, force)) * factor),
    'EN 1995-1-1 8.2.3 (8.11), bolts of the slotted end',
  );
  if (across > 0)
    push(
      across / (factor * splittingCapacity(2 * timber, depth, depth / 2)),
      'EN 1995-1-1 8.1.4 (8.4), splitting at the bolts',
    );
  const crush = hubLimit(hub, 'fc', actions.duration, rules);
  if (crush !== null) push(force / (end.bolts * end.diameter * end.plate * crush), 'bearing of the bolts in the plate');
  const hole = end.diameter + HOLE_OVER;
  const least = leastDistances(end.diameter);
  if (end.bolts > 1 && force > 0) push(least.along / end.spacing, 'EN 1995-1-1 table 8.4, distance between bolts');
  if (force > 0) push(least.edge / (depth / 2), 'EN 1995-1-1 table 8.4, edge distance');
  const tension = hubLimit(hub, 'ftZ', actions.duration, rules);
  if (tension !== null) {
    const net = (depth - hole) * end.plate;
    const pulled = actions.axial > 0 ? force / net : 0;
    push((pulled + (6 * bending) / (net * end.plate)) / tension, 'net section of the plate, across layers');
  }
  if (actions.axial < 0) push(least.pressedEnd / end.endDistance, 'EN 1995-1-1 table 8.4, unloaded end');
  if (actions.axial > 0) {
    push(least.end / end.endDistance, 'EN 1995-1-1 table 8.4, loaded end');
    const net = woodLimit(strut, 'ft', actions.duration, rules);
    const left = strutArea(c) - end.slot * depth - 2 * timber * hole;
    if (net !== null) push(force / (left * net), 'EN 1995-1-1 5.2, net section of the slotted end');
    const shear = hubLimit(hub, 'fv', actions.duration, rules);
    if (shear !== null)
      push(force / (2 * end.bolts * end.plateEnd * end.plate * shear), 'tear-out of the plate behind its bolts');
  }
  return checks;
};

/** Characteristic capacity of the row under a force at an angle to the grain, N: two planes a bolt, nef bolts. */
function boltCapacity(c: SocketCase, end: BoltedEnd, timber: number, angle: number): number {
  const density = c.strut.densityK ?? 0.9 * c.strut.density;
  const joint = plateInTheMiddle(
    embeddingAtAngle(embeddingStrength(end.diameter, density), end.diameter, angle),
    end.diameter,
    timber,
    yieldMoment(end.diameter, PIN_STEEL.fu),
  );
  return 2 * joint.perPlane * effectiveNumber(end.bolts, end.spacing, end.diameter);
}
