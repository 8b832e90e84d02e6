import { sectionProperties } from '../../model/section.js';
import type { SocketCase } from './case.js';

/** Length of the strut inside its socket, mm: depth less float, never negative. */
export const engaged = ({ socket, float }: SocketCase): number => Math.max(0, socket.depth - float);

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
export function sleeve({ socket, passes }: SocketCase): { readonly area: number; readonly modulus: number } {
  const { bore, wall } = socket;
  // A solid round of area A has W = A d / 8 with d = sqrt(4 A / pi).
  if (passes && !passes.hollow)
    return { area: passes.wallArea, modulus: (passes.wallArea * Math.sqrt((4 * passes.wallArea) / Math.PI)) / 8 };
  if (typeof bore === 'number') {
    const outer = bore + 2 * wall;
    return {
      area: (Math.PI * (outer ** 2 - bore ** 2)) / 4,
      modulus: (Math.PI * (outer ** 4 - bore ** 4)) / (32 * outer),
    };
  }
  const [low, high] = bore[0] < bore[1] ? bore : [bore[1], bore[0]];
  const [b, h] = [low + 2 * wall, high + 2 * wall];
  return { area: b * h - low * high, modulus: (h * b ** 3 - high * low ** 3) / (6 * b) };
}
