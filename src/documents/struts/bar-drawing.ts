import type { PlannedBar } from '../../model/plan.js';
import { fitText } from '../kit/fit-text.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import type { Pen } from '../kit/pen.js';
import type { Units } from '../kit/units.js';

export interface BarDrawing {
  readonly bar: PlannedBar;
  /** Trimmed off the first end and off the far end, mm. */
  readonly trim: readonly [number, number];
  readonly kerf: number;
}

/** Height of a drawn bar on paper, mm. */
export const BAR_HEIGHT = 8.5;
/** Texts in a bar are no smaller than this, pt; what does not fit is told by the settings above the bar. */
const LEAST = 6.5;
/** Distance of the strokes that fill waste, mm. */
const HATCH = 1.8;

/** Draws a bar from its squared end on the left, `scale` mm of paper a mm: pieces with their lengths, cuts, what is left. */
export function drawBar(pen: Pen, x: number, y: number, scale: number, drawing: BarDrawing, units: Units): void {
  const { bar, trim, kerf } = drawing;
  const width = bar.length * scale;
  let at = trim[0];
  if (at > 0) hatch(pen, x, y, at * scale, BAR_HEIGHT);
  bar.cuts.forEach((cut, i) => {
    const [left, room] = [x + at * scale, cut.length * scale];
    pen.rectangle(left, y, room, BAR_HEIGHT, { fill: INK.white, width: LINE.thin });
    write(pen, units.cut(cut.length), left, y, room, true);
    at += cut.length;
    // The last cut has no width where the bar ends before the blade does.
    const blade = Math.min(kerf, bar.length - trim[1] - at);
    if (blade > 0 && (i < bar.cuts.length - 1 || bar.offcut > 0 || blade > 0)) {
      const shown = Math.max(blade * scale, LINE.thin);
      pen.rectangle(x + at * scale, y - 1, shown, BAR_HEIGHT + 2, { fill: INK.black });
      at += blade;
    }
  });
  const [left, room] = [x + at * scale, (bar.length - at) * scale];
  if (room > 0.05) {
    if (!bar.kept) hatch(pen, left, y, room, BAR_HEIGHT);
    else {
      pen.rectangle(left, y, room, BAR_HEIGHT, { fill: RACK });
      write(pen, `rack ${units.length(bar.offcut)}`, left, y, room, false);
    }
  }
  pen.rectangle(x, y, width, BAR_HEIGHT, { width: LINE.normal });
}

const RACK = '#e4e4e4';

function write(pen: Pen, text: string, x: number, y: number, room: number, bold: boolean): void {
  const fitted = fitText(pen, text, room - 1.2, { size: SIZE.body, bold }, LEAST);
  if (fitted.text !== text) return;
  pen.text(text, x + room / 2, y + BAR_HEIGHT / 2 + fitted.size * 0.12, { size: fitted.size, bold, align: 'centre' });
}

/** Strokes at 45 degrees inside a box: waste. */
function hatch(pen: Pen, x: number, y: number, width: number, height: number): void {
  for (let c = HATCH; c < width + height; c += HATCH) {
    const from = [x + Math.min(c, width), y + Math.max(0, c - width)] as const;
    const to = [x + Math.max(0, c - height), y + Math.min(c, height)] as const;
    pen.line([from[0], from[1]], [to[0], to[1]], { width: LINE.hair });
  }
}
