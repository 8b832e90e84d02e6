import type { HubPart, Socket } from '../../model/parts.js';
import { areaOf, boreHalf, perimeterOf } from './sleeve.js';
import type { SocketStrength } from './system.js';

/** Share of the body's own section that is left at least where bores crowd a section: they are apart by the web. */
const LEAST_NET = 0.1;

/**
 * Areas through which a drilled ball or cube passes the force of each dowel: the bore's wall, which glue holds, its floor, and the section
 * through the body's middle square to the dowel less what other bores can take of it (each its own profile, diameter times depth).
 * The body's grain runs anyhow to a bore, so its wood is taken across the grain everywhere.
 *
 * @param section the least section through the undrilled body's middle, mm²
 */
export function boredStrength(hub: HubPart, section: number): SocketStrength[] {
  const profile = (s: Socket): number => (typeof s.bore === 'number' ? s.bore : Math.max(...s.bore)) * s.depth;
  return hub.sockets.map((s) => {
    const half = boreHalf(s);
    const others = hub.sockets.reduce((sum, o) => (o === s ? sum : sum + profile(o)), 0);
    const net = Math.max(LEAST_NET * section, section - others);
    return {
      strut: s.strut,
      wallArea: net,
      wall: s.wall,
      bondArea: perimeterOf(half) * (s.depth - (s.travel ?? 0) - (s.shallow ?? 0)),
      stopArea: areaOf(half),
      rootArea: net,
      pin: s.pin > 0 ? { diameter: s.pin, shearPlanes: 2, bearingArea: 2 * s.pin * s.wall } : null,
      acrossLayers: 1,
      solid: true,
    };
  });
}
