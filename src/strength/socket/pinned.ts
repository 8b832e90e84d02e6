import { PIN_STEEL } from '../../model/catalogue/pin.js';
import { GAMMA_M_CONNECTION, kMod } from '../../model/catalogue/timber-factors.js';
import { PIN_FACTORS, pinBearing, pinUse } from '../en1993/pin.js';
import { embeddingStrength } from '../en1995/joint/embedding.js';
import { leastDistances } from '../en1995/joint/row.js';
import { hubLimit, woodLimit } from '../limits.js';
import type { Verdict } from '../standard.js';
import type { SocketCase, SocketPath } from './case.js';
import { acrossPin, engaged, pinHole, sleeve, strutArea } from './geometry.js';
import { sleeveChecks } from './sleeve.js';

/**
 * Pinned: a steel cross pin at half the socket's depth carries tension and compression.
 * Pin in double shear 0.6 A fup / gammaM2 a plane and in bending F/8 (b + 4 c + 2 a) against 1.5 Wel fyp / gammaM0 (EN 1993-1-8 3.13, table 3.10, figure 3.11);
 * bearing on wood fh,k = 0.082 (1 - 0.01 d) rho_k (EN 1995-1-1 8.5.1.1 (8.16)) and on the two walls; in tension the strut's net section, plug shear of the wood
 * behind the pin (two planes as long as the end distance; dowels of 6 mm and more in graded timber keep the distances of EN 1995-1-1 8.6) and of the walls before it, and the sleeve's net section.
 */
export const pinned: SocketPath = (c) => {
  const { actions, rules, strut, hub, socket } = c;
  const d = socket.pin;
  const force = Math.abs(actions.axial);
  if (d <= 0) return force === 0 ? [] : null;
  const { duration } = actions;
  const [t, wall] = [acrossPin(c), socket.wall];
  const checks: Verdict[] = [...pinChecks(c, force)];
  const push = (utilisation: number, rule: string): void => void checks.push({ utilisation, rule });

  const crush = hubLimit(hub, 'fc', duration, rules);
  if (crush !== null) push(force / (2 * d * wall * crush), 'bearing of the pin on the socket walls');
  const wood = woodBearing(c);
  if (wood !== null) push(force / (d * t * wood), 'EN 1995-1-1 8.5.1.1 (8.16), bearing of the pin on the strut');
  const { shape } = socket.section;
  const yielding = strut.strength['fy'] ?? strut.strength['fo'];
  if (yielding !== undefined) {
    const metal = shape.kind === 'tube' ? 2 * shape.wall : t;
    push(
      force / pinBearing(metal, d, Math.min(yielding, PIN_STEEL.fy)),
      'EN 1993-1-8 3.13.2, table 3.10, bearing of the pin on the strut',
    );
  }
  if (actions.axial > 0) {
    const net = woodLimit(strut, 'ft', duration, rules) ?? metalLimit(c);
    if (net !== null)
      push(force / ((strutArea(c) - pinHole(c)) * net), 'EN 1995-1-1 5.2, net section of the strut at the pin');
    const end = engaged(c) - (socket.depth - (socket.travel ?? 0)) / 2;
    const fu = strut.strength['fu'];
    if (fu !== undefined) {
      // Two planes a wall as long as the end distance, EN 1993-1-8 3.10.2 in shear alone.
      const torn =
        2 * Math.max(0, end) * (shape.kind === 'tube' ? 2 * shape.wall : t) * (fu / (Math.sqrt(3) * PIN_FACTORS.m2));
      push(torn > 0 ? force / torn : NO_END_DISTANCE, 'shear of the strut behind the pin');
    }
    const plug = woodLimit(strut, 'fv', duration, rules);
    if (plug !== null)
      push(end > 0 ? force / (2 * end * t * plug) : NO_END_DISTANCE, 'plug shear of the strut behind the pin');
    // Thinner pins are no dowels by 8.6 (2); plug shear alone judges them.
    if (d >= LEAST_DOWEL && strut.strength['fvk'] !== undefined) {
      const least = leastDistances(d);
      if (force > 0)
        push(end > 0 ? least.end / end : NO_END_DISTANCE, 'EN 1995-1-1 8.6, table 8.5, loaded end of the pin');
      if (force > 0) push(least.edge / (t / 2), 'EN 1995-1-1 8.6, table 8.5, edge of the pin');
    }
    const plastic = hubLimit(hub, 'fv', duration, rules);
    if (plastic !== null)
      push(
        force / (4 * ((socket.depth - (socket.shallow ?? 0)) / 2) * wall * plastic),
        'plug shear of the socket walls',
      );
  }
  return [...checks, ...sleeveChecks(c, sleeve(c).area - 2 * d * wall)];
};

/** Thinnest dowel that EN 1995-1-1 8.6 (2) covers, mm. */
const LEAST_DOWEL = 6;

/** Utilisation reported where the pin sits beyond the strut's end: it holds nothing, however small the force. */
const NO_END_DISTANCE = 1000;

function pinChecks(c: SocketCase, force: number): Verdict[] {
  const { bore, wall, pin, form, section } = c.socket;
  const { shape } = section;
  const inside = typeof bore === 'number' ? bore : Math.min(...bore);
  // A spigot is the middle plate between the tube's walls; in a sleeve the strut is.
  const plates =
    form === 'spigot' && shape.kind === 'tube'
      ? { a: shape.wall, b: inside, c: Math.max(0, (shape.diameter - 2 * shape.wall - inside) / 2) }
      : { a: wall, b: acrossPin(c), c: Math.max(0, (inside - acrossPin(c)) / 2) };
  const { shear, combined } = pinUse(force, { d: pin, ...PIN_STEEL }, plates);
  return [
    { utilisation: shear, rule: 'EN 1993-1-8 3.13.2, table 3.10, pin in shear' },
    { utilisation: combined, rule: 'EN 1993-1-8 3.13.2, table 3.10, pin in shear and bending' },
  ];
}

/** Embedding strength along the grain, MPa, design value; the density stands for rho_k where no class gives one, at nine tenths. */
function woodBearing({ strut, socket, actions, rules }: SocketCase): number | null {
  if (strut.family !== 'timber' && strut.family !== 'glulam') return null;
  const density = strut.densityK ?? 0.9 * strut.density;
  const fhk = embeddingStrength(socket.pin, density);
  return (kMod(rules.serviceClass, actions.duration) * fhk) / GAMMA_M_CONNECTION;
}

/** Metal tube at the pin's holes: 0.9 fu / gammaM2 (EN 1993-1-1 6.2.3 (6.7); EN 1999-1-1 6.2.3 has the same form). */
const metalLimit = ({ strut }: SocketCase): number | null =>
  strut.strength['fu'] === undefined ? null : (0.9 * strut.strength['fu']) / PIN_FACTORS.m2;
