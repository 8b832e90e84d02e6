import { lineHeight, type Pen, type TextStyle } from './pen.js';

/** The text at the largest size from `style.size` down to `least` pt at which it is no wider than `width` mm, cut with an ellipsis if none is. */
export function fitText(
  pen: Pen,
  text: string,
  width: number,
  style: TextStyle,
  least: number,
): { readonly text: string; readonly size: number } {
  const wanted = style.size ?? 9;
  const natural = pen.widthOf(text, style);
  if (natural <= width) return { text, size: wanted };
  const size = Math.max(least, Math.floor((10 * wanted * width) / natural) / 10);
  if (pen.widthOf(text, { ...style, size }) <= width) return { text, size };
  return { text: cut(pen, text, width, { ...style, size }), size };
}

/** The longest beginning of the text that fits with an ellipsis behind it. */
function cut(pen: Pen, text: string, width: number, style: TextStyle): string {
  const chars = [...text];
  let [low, high] = [0, chars.length];
  while (low < high) {
    const middle = Math.ceil((low + high) / 2);
    if (pen.widthOf(`${chars.slice(0, middle).join('')}…`, style) <= width) low = middle;
    else high = middle - 1;
  }
  return `${chars.slice(0, low).join('').trimEnd()}…`;
}

/** The text in lines no wider than `width` mm, broken at spaces, and inside a word that is wider than a line. */
export function wrapText(pen: Pen, text: string, width: number, style: TextStyle): string[] {
  const lines: string[] = [];
  for (const paragraph of text.split('\n')) {
    let line = '';
    let long = 0; // the line's width as far as it is known
    for (const word of paragraph.split(' ')) {
      const joined = line === '' ? word : `${line} ${word}`;
      const guess = line === '' ? pen.widthOf(word, style) : long + addedWidth(pen, line, word, style);
      const fits = Math.abs(guess - width) > SURE ? guess < width : pen.widthOf(joined, style) <= width;
      if (fits) {
        line = joined;
        long = guess;
        continue;
      }
      if (line !== '') lines.push(line);
      line = word;
      while (pen.widthOf(line, style) > width && [...line].length > 1) {
        const head = headThatFits(pen, line, width, style);
        lines.push(head);
        line = line.slice(head.length);
      }
      long = pen.widthOf(line, style);
    }
    lines.push(line);
  }
  return lines;
}

/** Nearer than this to the limit a line is laid out as a whole, mm: far above what adding widths up can be off. */
const SURE = 0.5;

/** By how much a word lengthens a line, mm: a face moves letters towards the spaces beside them, and each such pair is known by its width alone. */
function addedWidth(pen: Pen, line: string, word: string, style: TextStyle): number {
  const last = line.slice(-1);
  const beside = pen.widthOf(`${last} `, style) - pen.widthOf(last, style) - pen.widthOf(' ', style);
  return pen.widthOf(` ${word}`, style) + beside;
}

function headThatFits(pen: Pen, word: string, width: number, style: TextStyle): string {
  const chars = [...word];
  let n = chars.length - 1;
  while (n > 1 && pen.widthOf(chars.slice(0, n).join(''), style) > width) n--;
  return chars.slice(0, n).join('');
}

/** Writes one line inside `width` mm, smaller or cut where it must be. */
export function writeFitted(
  pen: Pen,
  text: string,
  x: number,
  y: number,
  width: number,
  style: TextStyle = {},
  least = 6.5,
): void {
  const fitted = fitText(pen, text, width, style, least);
  pen.text(fitted.text, x, y, { ...style, size: fitted.size });
}

/** Writes wrapped lines from the baseline y down; at most `most` lines, the last cut. Returns the baseline after the last. */
export function writeWrapped(
  pen: Pen,
  text: string,
  x: number,
  y: number,
  width: number,
  style: TextStyle = {},
  most = Number.POSITIVE_INFINITY,
): number {
  const size = style.size ?? 9;
  const lines = wrapText(pen, text, width, style);
  const shown = lines.length > most ? [...lines.slice(0, most - 1), lines.slice(most - 1).join(' ')] : lines;
  let at = y;
  for (const line of shown) {
    writeFitted(pen, line, x, at, width, style, size);
    at += lineHeight(size);
  }
  return at;
}
