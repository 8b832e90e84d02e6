/** One thing that is wrong in an input file. Lines and columns count from 1; a column counts UTF-16 units. */
export interface Fault {
  readonly file: string;
  readonly line: number;
  readonly column: number;
  readonly what: string;
  readonly mend: string;
}

/** `file:line:column: what is wrong: how to mend it`, always one line. */
export const sayFault = (f: Fault): string => `${visible(f.file)}:${f.line}:${f.column}: ${f.what}: ${f.mend}`;

const SHOWN = 40;
/** Control and format characters (which turn or hide what follows), lone surrogates, separators but the space. */
const HIDDEN = /[\p{Cc}\p{Cf}\p{Cs}\p{Zl}\p{Zp}]/gu;

/** A text from the input for a sentence: in quotation marks, cut short, what does not print as \u{...}. */
export function quoted(text: string): string {
  const characters = [...text.slice(0, 2 * SHOWN + 2)];
  const short = characters.length > SHOWN ? `${characters.slice(0, SHOWN).join('')}...` : text;
  return `"${visible(short)}"`;
}

const visible = (text: string): string => text.replace(HIDDEN, (c) => `\\u{${c.codePointAt(0)!.toString(16)}}`);
