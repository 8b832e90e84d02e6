import { expect, it } from 'vitest';
import { wrapText } from '../../../src/documents/kit/fit-text.js';
import { Pen } from '../../../src/documents/kit/pen.js';
import { loadFonts } from '../../../src/machine/fonts.js';
import { seededRandom } from '../../../src/maths/random.js';

const pen = new Pen({ fonts: await loadFonts(), title: '', author: '', subject: '', date: null });

/** Words whose letters stand nearer to a space than others (P, T, V, Y), figures, and some that the face lacks. */
const WORDS =
  'The truss has no supports: To AV VA TAP T. Y, P 111 0.5 mm σ Ж č −12 ≥ Ø8 P11 a-very-long-word-indeed'.split(' ');

/** The plain way: every line is measured as a whole. */
function wrapPlainly(text: string, width: number, style: { size: number; bold: boolean }): string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    const joined = line === '' ? word : `${line} ${word}`;
    if (line === '' || pen.widthOf(joined, style) <= width) line = joined;
    else {
      lines.push(line);
      line = word;
    }
  }
  return [...lines, line];
}

it('breaks lines where measuring every line as a whole would', () => {
  const random = seededRandom(3);
  for (let k = 0; k < 200; k++) {
    const text = Array.from({ length: 40 }, () => WORDS[Math.floor(random() * WORDS.length)]).join(' ');
    const style = { size: 7 + Math.floor(random() * 6), bold: random() < 0.5 };
    const width = 60 + 120 * random();
    expect(wrapText(pen, text, width, style)).toEqual(wrapPlainly(text, width, style));
  }
});
