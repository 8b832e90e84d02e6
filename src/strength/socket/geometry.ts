import { sectionProperties } from '../../model/section.js';
import type { SocketCase } from './case.js';

/** Length of the strut inside its socket once it is in its place, mm: depth less float, less the way that it slid back and less what a tilted face takes at the mouth, never negative. */
export const engaged = ({ socket, float }: SocketCase): number =>
  Math.max(0, socket.depth - (socket.travel ?? 0) - (socket.shallow ?? 0) - float);

/** Surface of the bond, mm²: of strut or socket, whichever is less, over the engaged length. */
export function bondSurface(c: SocketCase): number {
  const { shape } = c.socket.section;
  const strut = shape.kind === 'rectangle' ? 2 * (shape.width + shape.height) : Math.PI * shape.diameter;
  return Math.min(strut, c.passes?.bondPerDepth ?? strut) * engaged(c);
}

/** Area of the strut, mm². */
export const strutArea = ({ socket }: SocketCase): number => sectionProperties(socket.section.shape).area;

/** What the strut's end stands on, mm²: its own end, or less where the stop has a vent. */
export const stopArea = (c: SocketCase): number =>
  Math.min(strutArea(c), c.passes?.stopArea ?? Number.POSITIVE_INFINITY);

/** Thickness of the strut across a cross pin, mm: the smaller side of a rectangle. */
export function acrossPin({ socket }: SocketCase): number {
  const { shape } = socket.section;
  return shape.kind === 'rectangle' ? Math.min(shape.width, shape.height) : shape.diameter;
}

/** Cross-section of the sleeve, or of what stands for it: area mm², section modulus mm³ (of its weak axis). */
export function sleeve({ socket, passes }: SocketCase): Sizes {
  const { bore, wall } = socket;
  // A solid round of area A has W = A d / 8 with d = sqrt(4 A / pi).
  if (passes && !passes.hollow)
    return { area: passes.wallArea, modulus: (passes.wallArea * Math.sqrt((4 * passes.wallArea) / Math.PI)) / 8 };
  // A cradle that is open on a side has less; its modulus is taken to go with its area.
  const opened = (whole: Sizes): Sizes => {
    if (!passes || passes.wallArea >= whole.area) return whole;
    return { area: passes.wallArea, modulus: (whole.modulus * passes.wallArea) / whole.area };
  };
  if (typeof bore === 'number') {
    const outer = bore + 2 * wall;
    return opened({
      area: (Math.PI * (outer ** 2 - bore ** 2)) / 4,
      modulus: (Math.PI * (outer ** 4 - bore ** 4)) / (32 * outer),
    });
  }
  const [low, high] = bore[0] < bore[1] ? bore : [bore[1], bore[0]];
  const [b, h] = [low + 2 * wall, high + 2 * wall];
  return opened({ area: b * h - low * high, modulus: (h * b ** 3 - high * low ** 3) / (6 * b) });
}

/** Area mm² and section modulus mm³. */
interface Sizes {
  readonly area: number;
  readonly modulus: number;
}

/** Section that a cross pin's hole takes from the strut, mm²: both walls of a tube. */
export function pinHole(c: SocketCase): number {
  const { shape } = c.socket.section;
  return c.socket.pin * (shape.kind === 'tube' ? 2 * shape.wall : acrossPin(c));
}
