import { sectionProperties } from '../../model/section.js';
import type { SocketCase } from './case.js';

/** Length of the strut inside its socket, mm: depth less float, never negative. */
export const engaged = ({ socket, float }: SocketCase): number => Math.max(0, socket.depth - float);

/** Perimeter of the strut, mm. */
export function perimeter({ socket }: SocketCase): number {
  const { shape } = socket.section;
  return shape.kind === 'rectangle' ? 2 * (shape.width + shape.height) : Math.PI * shape.diameter;
}

/** Area of the strut, mm². */
export const strutArea = ({ socket }: SocketCase): number => sectionProperties(socket.section.shape).area;

/** Thickness of the strut across a cross pin, mm: the smaller side of a rectangle. */
export function acrossPin({ socket }: SocketCase): number {
  const { shape } = socket.section;
  return shape.kind === 'rectangle' ? Math.min(shape.width, shape.height) : shape.diameter;
}

/** The sleeve's own cross-section: area mm², section modulus mm³ (of its weak axis). */
export function sleeve({ socket }: SocketCase): { readonly area: number; readonly modulus: number } {
  const { bore, wall } = socket;
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
