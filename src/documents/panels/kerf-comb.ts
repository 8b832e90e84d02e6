import { letters } from '../../detailing/panels/engraving.js';
import type { Job } from '../../model/job/index.js';
import type { Point2 } from '../../model/parts.js';
import { type Drawing, type DrawingLine, straightLine } from '../kit/drawing.js';

/** Strips of the comb: width, length, how many; mm. Ten cuts are averaged. */
const STRIP = 10;
const LENGTH = 60;
const COUNT = 10;
const BORDER = 10;

/**
 * A strip of 100 x 60 mm cut into ten along lines drawn 10 mm apart, nothing compensated. Packed against each other the
 * ten pieces measure less than drawn: kerf = (drawn width - packed width) / number of pieces. Cut once in the job's own
 * sheet, the result goes into `cutter.kerf_mm`.
 */
export function kerfComb(cutter: Job['cutter']): Drawing {
  const width = COUNT * STRIP;
  const at = (x: number, y: number): Point2 => [BORDER + x, BORDER + y];
  const cuts: DrawingLine[] = [];
  for (let k = 1; k < COUNT; k++) cuts.push(straightLine([at(k * STRIP, 0), at(k * STRIP, LENGTH)], false));
  const frame = straightLine([at(0, 0), at(width, 0), at(width, LENGTH), at(0, LENGTH)], true);
  const words = ['PACK 10 PIECES, MEASURE', 'KERF = (100 - WIDTH) / 10'].flatMap((text, i) =>
    letters(text, 4).strokes.map((line) =>
      straightLine(
        line.map(([x, y]) => at(x, LENGTH + 10 + 7 * (1 - i) + y)),
        false,
      ),
    ),
  );
  const numbers = Array.from({ length: COUNT }, (_, k) =>
    letters(String(k + 1), 3).strokes.map((line) =>
      straightLine(
        line.map(([x, y]) => at(k * STRIP + 3 + x, 4 + y)),
        false,
      ),
    ),
  ).flat();
  const { layers } = cutter;
  return {
    title: 'Kerf comb: pack the ten pieces, measure their width; kerf = (100 - width) / 10',
    width: width + 2 * BORDER,
    height: LENGTH + 2 * BORDER + 20,
    layers: [
      { ...layers.keep, purpose: 'keep', lines: words },
      { ...layers.engrave, purpose: 'engrave', lines: numbers },
      { ...layers.inside, purpose: 'inside', lines: cuts },
      { ...layers.outside, purpose: 'outside', lines: [frame] },
    ],
  };
}
