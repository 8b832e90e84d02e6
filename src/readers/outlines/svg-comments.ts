/** What stands between these in XML is no drawing (XML 1.0, 2.5 to 2.8). */
const PAIRS: readonly (readonly [string, string])[] = [
  ['<!--', '-->'],
  ['<![CDATA[', ']]>'],
  ['<?', '?>'],
];

/**
 * An XML text with comments, character data, instructions and the document type blanked, its lines where they were; and where the
 * first of these that never ends begins, or -1. Each character is looked at once: searching anew from every opening would take
 * the square of a file of nothing but openings.
 */
export function withoutComments(text: string): { readonly body: string; readonly unended: number } {
  const parts: string[] = [];
  let done = 0;
  for (let at = text.indexOf('<'); at >= 0; at = text.indexOf('<', at)) {
    const end = endOf(text, at);
    if (end === null) {
      at++;
      continue;
    }
    parts.push(text.slice(done, at), blank(text.slice(at, end < 0 ? text.length : end)));
    if (end < 0) return { body: parts.join(''), unended: at };
    done = end;
    at = end;
  }
  return { body: parts.join('') + text.slice(done), unended: -1 };
}

/** Where what begins at `at` ends; null: it is none of these; -1: nowhere. */
function endOf(text: string, at: number): number | null {
  const pair = PAIRS.find(([open]) => text.startsWith(open, at));
  if (pair) return after(text, pair[1], at + pair[0].length);
  if (!text.startsWith('<!DOCTYPE', at)) return null;
  const [subset, close] = [text.indexOf('[', at), text.indexOf('>', at)];
  if (subset < 0 || close < subset) return after(text, '>', at);
  const inner = after(text, ']', subset);
  return inner < 0 ? -1 : after(text, '>', inner);
}

function after(text: string, close: string, from: number): number {
  const at = text.indexOf(close, from);
  return at < 0 ? -1 : at + close.length;
}

const blank = (text: string): string => text.replace(/[^\n]+/g, (line) => ' '.repeat(line.length));
