import { type Node, type ParseError, parseTree } from 'jsonc-parser';
import { isUsable, LIMITS } from '../model/limits.js';
import { type Fault, quoted } from './fault.js';
import { linePlaces } from './line-places.js';

export type Path = readonly PropertyKey[];

/** A JSON file with comments: its value, and the place in the text of each part of it. */
export interface JsonDocument {
  /** undefined where the text is not JSON at all. */
  readonly value: unknown;
  /** Faults of the text itself: syntax, keys given twice, numbers that are not finite. */
  readonly faults: readonly Fault[];
  /** Offsets of values already reported, so that no other check reports them again. */
  readonly reported: ReadonlySet<number>;
  /** Offset of the value at a path, or of its key; of the deepest part that exists where the path leads nowhere. */
  offset(path: Path, part?: 'key' | 'value'): number;
  fault(offset: number, what: string, mend: string): Fault;
}

/** Parses JSON with comments (no comma before a closing bracket), keeping every place. Never throws. */
export function parseJson(text: string, name: string): JsonDocument {
  const body = text.charCodeAt(0) === 0xfeff ? ` ${text.slice(1)}` : text;
  const places = linePlaces(body);
  const fault = (offset: number, what: string, mend: string): Fault => ({ file: name, ...places(offset), what, mend });
  const refused = (offset: number, what: string, mend: string): JsonDocument => ({
    value: undefined,
    faults: [fault(offset, what, mend)],
    reported: new Set(),
    offset: () => 0,
    fault,
  });

  if (body.length > LIMITS.fileCharacters)
    return refused(0, `is larger than ${LIMITS.fileCharacters} characters`, 'split the work into several files');
  const deep = tooDeep(body);
  if (deep !== null) return refused(deep, `is nested more than ${LIMITS.depth} deep`, 'remove brackets');

  const errors: ParseError[] = [];
  const root = parseTree(body, errors, { allowTrailingComma: false });
  const faults: Fault[] = [];
  const reported = new Set<number>();
  const lines = new Set<number>();
  for (const error of errors) {
    const { line } = places(error.offset);
    // The parser goes on after an error, and what it says next on the same line is mostly the same thing.
    if (!lines.has(line)) faults.push(fault(error.offset, ...syntaxWords(error, body)));
    lines.add(line);
  }
  if (!root || errors.length > 0) {
    if (faults.length === 0) faults.push(fault(0, 'is empty', 'write a JSON object { ... }'));
    return { value: undefined, faults, reported, offset: () => 0, fault };
  }
  const value = plainValue(root, (offset, what, mend) => {
    faults.push(fault(offset, what, mend));
    reported.add(offset);
  });
  return { value, faults, reported, offset: (path, part) => offsetAt(root, path, part ?? 'value'), fault };
}

/** Offset of the first bracket that is nested too deep, or null: the parser recurses, so this is checked first. */
function tooDeep(text: string): number | null {
  let depth = 0;
  for (let i = 0; i < text.length; i++) {
    const c = text[i];
    if (c === '"') i = endOfText(text, i);
    else if (c === '/' && text[i + 1] === '/') i = endOr(text.indexOf('\n', i), text);
    else if (c === '/' && text[i + 1] === '*') i = endOr(text.indexOf('*/', i + 2), text);
    else if (c === '}' || c === ']') depth--;
    else if ((c === '{' || c === '[') && ++depth > LIMITS.depth) return i;
  }
  return null;
}

const endOr = (found: number, text: string): number => (found < 0 ? text.length : found);

/** Offset of the quotation mark that ends the text begun at `start`, or of the line's end where none does. */
function endOfText(text: string, start: number): number {
  for (let i = start + 1; i < text.length; i++) {
    const c = text[i];
    if (c === '\\') i++;
    else if (c === '"' || c === '\n' || c === '\r') return i;
  }
  return text.length;
}

/** The value of a tree, with its own keys only; `__proto__` is never taken over. */
function plainValue(node: Node, report: (offset: number, what: string, mend: string) => void): unknown {
  if (node.type === 'array') return (node.children ?? []).map((child) => plainValue(child, report));
  if (node.type === 'number' && !isUsable(node.value)) {
    const size = Math.abs(node.value);
    if (size < 1) report(node.offset, 'the number is too small to reckon with', 'write 0');
    else
      report(
        node.offset,
        `the number is ${Number.isFinite(size) ? 'too large' : 'not finite'}`,
        `write a number below ${LIMITS.magnitude}`,
      );
    return 0;
  }
  if (node.type !== 'object') return node.value;
  const out: Record<string, unknown> = {};
  for (const property of node.children ?? []) {
    const [key, child] = property.children ?? [];
    if (!key || !child) continue;
    const known = String(key.value);
    if (known === '__proto__') report(key.offset, 'the key "__proto__" cannot be used', 'choose another name');
    else if (Object.hasOwn(out, known))
      report(key.offset, `the key ${quoted(known)} stands twice in one object`, 'keep one of the two');
    else out[known] = plainValue(child, report);
  }
  return out;
}

function offsetAt(root: Node, path: Path, part: 'key' | 'value'): number {
  let node = root;
  let key = root;
  for (const segment of path) {
    if (node.type === 'array' && typeof segment === 'number') {
      const child = node.children?.[segment];
      if (!child) break;
      [node, key] = [child, child];
    } else {
      const property =
        node.type === 'object' ? node.children?.find((p) => p.children?.[0]?.value === segment) : undefined;
      const [name, child] = property?.children ?? [];
      if (!name || !child) break;
      [node, key] = [child, name];
    }
  }
  return part === 'key' ? key.offset : node.offset;
}

/** Words by jsonc-parser's ParseErrorCode, whose enumeration exists in its types only. */
function syntaxWords(error: ParseError, text: string): [string, string] {
  const found = text.slice(error.offset, error.offset + error.length);
  const code: number = error.error;
  if (/^[-+]?(nan|inf(inity)?)\b/i.test(text.slice(error.offset, error.offset + 12)))
    return ['the number is not finite', 'write a finite number'];
  if ((code === 3 || code === 4) && /^[}\]]$/.test(found)) return ['a comma has nothing after it', 'remove the comma'];
  const words: Record<number, [string, string]> = {
    1: [
      `${quoted(found)} is not JSON`,
      'put texts in double quotation marks; the rest is a number, true, false or null',
    ],
    2: ['the number is not written as JSON writes it', 'use digits, a decimal point and an exponent'],
    3: ['a key is missing', 'write a key in double quotation marks'],
    4: ['a value is missing', 'write a value'],
    5: ['a colon is missing', 'put : between the key and its value'],
    6: ['a comma is missing', 'put , between the two values'],
    7: ['an object is not closed', 'add }'],
    8: ['a list is not closed', 'add ]'],
    9: ['there is something after the end', 'remove what follows the last closing bracket'],
    11: ['a comment is not closed', 'add */'],
    12: ['a text is not closed', 'add a double quotation mark'],
    13: ['the number is not finished', 'add the missing digits'],
    14: ['\\u is not followed by four hexadecimal digits', 'write \\u and four of 0-9 a-f'],
    15: ['the text holds an unknown escape', 'write \\\\ for a backslash'],
    16: ['the text holds a control character', 'remove it'],
  };
  return words[code] ?? ['is not JSON', 'mend the syntax here'];
}
