import { INK, SIZE } from '../ink.js';
import { capHeight, type Pen } from '../pen.js';
import type { Units } from '../units.js';
import { drawStroke, strokeOfForce } from './stroke.js';

/** Height of the legend, mm. */
export const FORCE_LEGEND_HEIGHT = 12;

/** Draws the scale of line widths for both signs, from y down: the largest force, a quarter and a sixteenth of a round number near it. */
export function drawForceLegend(pen: Pen, x: number, y: number, largest: number, units: Units): void {
  if (largest <= 0) {
    pen.text('No member carries a force.', x, y + 4, { size: SIZE.note });
    return;
  }
  const top = roundBelow(largest);
  const values = [top, top / 4, top / 16];
  ([1, -1] as const).forEach((sign, row) => {
    const baseline = y + 4 + row * 5;
    pen.text(sign > 0 ? 'T  tension' : 'C  compression', x, baseline, { size: SIZE.note, bold: true });
    let at = x + 24;
    for (const value of values) {
      const middle = baseline - capHeight(SIZE.note) / 2;
      drawStroke(pen, [at, middle], [at + 14, middle], strokeOfForce(sign * value, largest, 0));
      const text = `${units.force(sign * value)} ${units.forceUnit}`;
      at += 16 + pen.text(text, at + 15.5, baseline, { size: SIZE.note, colour: INK.black }) + 5;
    }
  });
}

/** The largest of 1, 2, 5 times a power of ten that is not above the value. */
function roundBelow(value: number): number {
  const power = 10 ** Math.floor(Math.log10(value));
  const share = value / power;
  return power * (share >= 5 ? 5 : share >= 2 ? 2 : 1);
}
