import { toRing } from '../../maths/polygon/ring.js';
import { selfCrossing } from '../../maths/polygon/simple.js';
import { tidyRing } from '../../maths/polygon/tidy.js';
import type { NestingFault, NestingRequest } from './request.js';

/** Corners nearer than this to each other or to a straight edge are one: below what any cutter follows. mm. */
export const OUTLINE_ROUND_OFF = 1e-6;

/** What in a request cannot be used, all of it at once. An empty list: the request can be nested. */
export function requestFaults(request: NestingRequest): NestingFault[] {
  const faults: NestingFault[] = [];
  const say = (place: string, wrong: string, mend: string): void => {
    faults.push({ place, wrong, mend });
  };
  const amount = (v: unknown): boolean => typeof v === 'number' && Number.isFinite(v) && v >= 0;
  if (!amount(request.spacing)) say('spacing', `is ${request.spacing}`, 'give a length in mm, 0 or more');
  if (!amount(request.margin)) say('margin', `is ${request.margin}`, 'give a length in mm, 0 or more');
  if (request.sheets.length === 0) say('sheets', 'is empty', 'give at least one sheet');
  request.sheets.forEach((s, i) => {
    const place = `sheets[${i}] ${s.name}`;
    if (!(amount(s.width) && amount(s.height) && s.width > 0 && s.height > 0))
      say(place, `is ${s.width} x ${s.height} mm`, 'give a width and a height above 0');
    if (s.available !== undefined && !(Number.isInteger(s.available) && s.available >= 0))
      say(place, `has available ${s.available}`, 'give a whole number, 0 or more, or leave it out');
    if (s.outline) outlineFault(place, s.outline, say);
  });
  const seen = new Set<string>();
  request.panels.forEach((p, i) => {
    const place = `panels[${i}] ${p.mark}`;
    if (seen.has(p.mark))
      say(
        place,
        'has the mark of an earlier panel',
        'give every panel a mark of its own, and a quantity for equal ones',
      );
    seen.add(p.mark);
    if (!(Number.isInteger(p.quantity) && p.quantity >= 0))
      say(place, `has quantity ${p.quantity}`, 'give a whole number, 0 or more');
    if (p.rotations && (p.rotations.length === 0 || !p.rotations.every(Number.isFinite)))
      say(place, 'has no usable rotation', 'list at least one angle in degrees, or leave it out for any');
    outlineFault(place, p.outline, say);
  });
  return faults;
}

function outlineFault(
  place: string,
  outline: readonly (readonly [number, number])[],
  say: (place: string, wrong: string, mend: string) => void,
): void {
  if (outline.some((p) => !(Number.isFinite(p[0]) && Number.isFinite(p[1])))) {
    say(place, 'has a corner that is no point', 'give two numbers in mm for each corner');
    return;
  }
  const ring = tidyRing(toRing(outline), OUTLINE_ROUND_OFF);
  if (ring.length < 6) {
    say(place, 'its outline encloses nothing', 'give at least three corners that are not in one line');
    return;
  }
  const crossing = selfCrossing(ring);
  if (crossing) {
    const [i] = crossing;
    say(
      place,
      `its outline crosses or touches itself near ${ring[2 * i]!.toFixed(3)}, ${ring[2 * i + 1]!.toFixed(3)}`,
      'give the corners in order round the panel',
    );
  }
}
