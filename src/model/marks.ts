/** What is wrong with a text, and how to mend it. */
export interface Problem {
  readonly what: string;
  readonly mend: string;
}

/** Longest mark, characters: it has to fit a printed socket and a label. */
export const MARK_LENGTH = 24;

/** A letter, then up to 23 letters, digits, _ or -. As text too, for the JSON Schema. */
export const MARK_PATTERN = '^[A-Za-z][A-Za-z0-9_-]{0,23}$';

const GRAMMAR = new RegExp(MARK_PATTERN);
/** Names of devices on Windows, whatever the case (Microsoft, Naming Files, Paths, and Namespaces). */
const RESERVED = /^(con|prn|aux|nul|com[0-9]|lpt[0-9])$/i;
/** What a spreadsheet turns into a date: a month's name and a number. Common practice, no source. */
const DATE_LIKE =
  /^(jan(uary)?|feb(ruary)?|mar(ch)?|apr(il)?|may|june?|july?|aug(ust)?|sept?(ember)?|oct(ober)?|nov(ember)?|dec(ember)?)-?[0-9]{1,4}$/i;

/** What keeps `text` from being a mark: the identifier on the part, in lists and in file names; null: nothing. */
export function markProblem(text: string): Problem | null {
  if (!GRAMMAR.test(text))
    return {
      what: 'is not a mark',
      mend: `use a letter, then up to ${MARK_LENGTH - 1} letters A-Z a-z, digits, _ or -`,
    };
  if (RESERVED.test(text))
    return { what: 'is a name that an operating system reserves', mend: 'choose another mark, since it names files' };
  if (DATE_LIKE.test(text))
    return {
      what: 'looks like a date to a spreadsheet',
      mend: 'choose another mark, such as one with _ before its number',
    };
  return null;
}

/** The form in which marks are compared: two marks that differ in case alone would share a file on some systems. */
export const markKey = (mark: string): string => mark.toLowerCase();

const CASE_LENGTH = 40;
/** Control characters, lone surrogates, line and paragraph separators: nothing that prints. */
const NOT_PRINTABLE = /[\p{Cc}\p{Cs}\p{Zl}\p{Zp}]/u;

/** What keeps `text` from being the name of a load case: 1 to 40 printable characters, but `__proto__`; null: nothing. */
export function caseNameProblem(text: string): Problem | null {
  if (text === '__proto__') return { what: 'is no name for a case', mend: 'choose another name' };
  const characters = [...text].length;
  if (text.trim() === '' || characters > CASE_LENGTH || NOT_PRINTABLE.test(text))
    return { what: 'is no name for a case', mend: `use 1 to ${CASE_LENGTH} printable characters` };
  return null;
}
