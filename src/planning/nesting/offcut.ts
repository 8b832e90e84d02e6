import { differenceOf } from '../../maths/polygon/boolean.js';
import { boundsOf, type Ring, toRing } from '../../maths/polygon/ring.js';
import { tidyRing } from '../../maths/polygon/tidy.js';
import type { Field } from './layout.js';
import type { PoseMaker } from './pose.js';

/** How far the solid round an offcut reaches beyond its box, mm: enough that no piece tunnels through a thin rim. */
const RIM = 1;

/**
 * What of a box round an offcut is not offcut, as solid areas that panels keep `margin` clear of. The box is the
 * offcut's own grown by a rim and cut in two along the middle, since a solid with a hole in it has no outline.
 */
export function obstaclesOf(outline: Ring, margin: number, maker: PoseMaker): Field['obstacles'] {
  const [x0, y0, x1, y1] = boundsOf(outline);
  const middle = (x0 + x1) / 2;
  const box = (left: number, right: number): Ring =>
    toRing([
      [left, y0 - RIM],
      [right, y0 - RIM],
      [right, y1 + RIM],
      [left, y1 + RIM],
    ]);
  return [box(x0 - RIM, middle), box(middle, x1 + RIM)]
    .flatMap((half) => differenceOf([half], [outline]))
    .map((ring) => tidyRing(ring, 1e-4))
    .filter((ring) => ring.length >= 6)
    .map((ring) => ({ pose: maker.pose(maker.shape(ring, [0]), 0), clear: margin }));
}
