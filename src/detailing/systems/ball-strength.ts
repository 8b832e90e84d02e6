import type { HubPart, Socket } from '../../model/parts.js';
import { areaOf, boreHalf, perimeterOf } from './sleeve.js';
import type { SocketStrength } from './system.js';

/** Share of the ball's own disc that is left at least where bores crowd a section: they are apart by the web. */
const LEAST_NET = 0.1;

/**
 * Areas through which a drilled ball passes the force of each dowel: the bore's wall, which glue holds, its floor, and the section
 * through the ball's middle square to the dowel less what other bores can take of it (each its own profile, diameter times depth).
 * The ball's grain runs anyhow to a bore, so its wood is taken across the grain everywhere.
 */
export function ballStrength(hub: HubPart, radius: number): SocketStrength[] {
  const disc = Math.PI * radius ** 2;
  const profile = (s: Socket): number => (typeof s.bore === 'number' ? s.bore : Math.max(...s.bore)) * s.depth;
  return hub.sockets.map((s) => {
    const half = boreHalf(s);
    const others = hub.sockets.reduce((sum, o) => (o === s ? sum : sum + profile(o)), 0);
    const net = Math.max(LEAST_NET * disc, disc - others);
    return {
      strut: s.strut,
      wallArea: net,
      wall: s.wall,
      bondArea: perimeterOf(half) * s.depth,
      stopArea: areaOf(half),
      rootArea: net,
      pin: s.pin > 0 ? { diameter: s.pin, shearPlanes: 2, bearingArea: 2 * s.pin * s.wall } : null,
      acrossLayers: 1,
      solid: true,
    };
  });
}
