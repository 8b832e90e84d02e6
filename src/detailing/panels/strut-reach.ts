import { dot, type Vec3 } from '../../maths/vec3.js';
import type { StrutPart } from '../../model/parts.js';
import type { Section } from '../../model/section.js';

/** Half-sizes of the largest strut of a batch: a radius, or half width and half height. mm. */
function halves(section: Section): number | readonly [number, number] {
  const { shape, measured } = section;
  if (shape.kind !== 'rectangle') return Math.max(shape.diameter, measured ?? 0) / 2;
  const excess = Math.max(0, (measured ?? 0) - Math.max(shape.width, shape.height));
  return [(shape.width + excess) / 2, (shape.height + excess) / 2];
}

/** How far a strut reaches from its axis along the unit vector n square to it, mm. */
export function reachAlong(section: Section, axes: StrutPart['axes'], n: Vec3): number {
  const half = halves(section);
  if (typeof half === 'number') return half;
  return half[0] * Math.abs(dot(axes.y, n)) + half[1] * Math.abs(dot(axes.z, n));
}

/**
 * How far a strut reaches from its axis along e, where only the part between heights `from` and `to` along n counts;
 * e and n unit and square to each other and to the axis, mm. null: the strut does not come between the heights.
 */
export function reachInSlab(
  section: Section,
  axes: StrutPart['axes'],
  e: Vec3,
  n: Vec3,
  from: number,
  to: number,
): number | null {
  const half = halves(section);
  if (typeof half === 'number') {
    const nearest = from > 0 ? from : to < 0 ? -to : 0;
    return nearest >= half ? null : Math.sqrt(half * half - nearest * nearest);
  }
  const [w, h] = half;
  const corner = (sy: number, sz: number): [number, number] => [
    sy * w * dot(axes.y, e) + sz * h * dot(axes.z, e),
    sy * w * dot(axes.y, n) + sz * h * dot(axes.z, n),
  ];
  const loop = [corner(1, 1), corner(-1, 1), corner(-1, -1), corner(1, -1)];
  let best: number | null = null;
  const offer = (v: number): void => {
    if (best === null || v > best) best = v;
  };
  loop.forEach((a, i) => {
    const b = loop[(i + 1) % 4]!;
    if (a[1] >= from && a[1] <= to) offer(a[0]);
    for (const level of [from, to])
      if ((a[1] - level) * (b[1] - level) < 0) offer(a[0] + ((level - a[1]) / (b[1] - a[1])) * (b[0] - a[0]));
  });
  return best;
}
