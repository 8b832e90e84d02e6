import type { z } from 'zod';
import { nearest } from '../maths/nearest.js';
import { type Fault, quoted } from './fault.js';
import type { JsonDocument, Path } from './json-document.js';

type Issue = z.core.$ZodIssue;

/** Holds a document against a schema: the parsed value, or every fault with its place. */
export function checkSchema<T extends z.ZodType>(
  document: JsonDocument,
  schema: T,
): { readonly value: z.output<T> | null; readonly faults: readonly Fault[] } {
  const result = schema.safeParse(document.value, { error: knownKeys, reportInput: true });
  if (result.success) return { value: result.data, faults: [] };
  const faults = result.error.issues.flatMap((issue) => faultsOf(document, issue, []));
  return { value: null, faults };
}

/** Hands the keys that an object knows through in the message, since the finished issue no longer has its schema. */
const knownKeys: z.core.$ZodErrorMap = (issue) => {
  if (issue.code !== 'unrecognized_keys') return undefined;
  const shape = (issue.inst as { _zod?: { def?: { shape?: object } } } | undefined)?._zod?.def?.shape;
  return Object.keys(shape ?? {}).join('\n');
};

function faultsOf(document: JsonDocument, issue: Issue, above: Path): Fault[] {
  const path = [...above, ...issue.path];
  if (issue.code === 'unrecognized_keys') {
    const known = issue.message.split('\n');
    return issue.keys.map((key) => {
      const near = nearest(key, known);
      return document.fault(
        document.offset([...path, key], 'key'),
        `the key ${quoted(key)} is unknown${within(path)}`,
        near ? `write ${quoted(near)}` : `use one of ${known.filter((k) => k !== '$schema').join(', ')}`,
      );
    });
  }
  if (issue.code === 'invalid_union' && issue.errors.length > 0) {
    const values = issue.errors.flatMap((branch) =>
      branch.flatMap((i) => (i.code === 'invalid_value' && i.path.length === 0 ? i.values : [])),
    );
    if (values.length === issue.errors.length)
      return faultsOf(document, { ...issue, code: 'invalid_value', values }, above);
    const kinds = issue.errors.flatMap((branch) =>
      branch.filter((i) => i.code === 'invalid_value' && i.path[0] === 'kind'),
    );
    const [first] = kinds;
    if (first && kinds.length === issue.errors.length)
      return faultsOf(
        document,
        { ...first, values: kinds.flatMap((i) => ('values' in i ? i.values : [])) } as Issue,
        path,
      );
    return nearestBranch(issue.errors).flatMap((inner) => faultsOf(document, inner, path));
  }
  const offset = document.offset(path);
  if (document.reported.has(offset)) return [];
  const key = path.at(-1);
  if ('input' in issue ? issue.input === undefined : false)
    return [document.fault(offset, `${label(path)} is missing`, `add ${quoted(String(key))}${example(issue)}`)];
  return [document.fault(offset, `${label(path)} ${wrong(issue)}`, mend(issue))];
}

/** The branch of a union that the writer most likely meant: its kind fits, then the fewest things are wrong. */
const nearestBranch = (branches: readonly (readonly Issue[])[]): readonly Issue[] =>
  [...branches].sort((a, b) => weigh(a) - weigh(b))[0] ?? [];

const weigh = (issues: readonly Issue[]): number =>
  issues.length + (issues.some((i) => i.code === 'invalid_value' && i.path[0] === 'kind') ? 1000 : 0);

/** The value's name in a sentence: its keys, list positions counted from 0 as in JSON paths. */
function label(path: Path): string {
  if (path.length === 0) return 'the file';
  let text = '';
  for (const part of path)
    text += typeof part === 'number' ? `[${part}]` : `${text ? '.' : ''}${quoted(String(part)).slice(1, -1)}`;
  return text;
}

const within = (path: Path): string => (path.length === 0 ? '' : ` in ${label(path)}`);

function example(issue: Issue): string {
  if (issue.code === 'invalid_value') return `: ${oneOf(issue.values)}`;
  return issue.code === 'invalid_type' ? `: ${kindOf(issue.expected)}` : '';
}

function wrong(issue: Issue): string {
  switch (issue.code) {
    case 'invalid_type':
      return `is ${found(issue.input)}, not ${kindOf(issue.expected)}`;
    case 'invalid_value':
      return `is ${found(issue.input)}`;
    case 'too_small':
      return `is too ${smallWord(issue.origin)}`;
    case 'too_big':
      return `is too ${largeWord(issue.origin)}`;
    default:
      return `is ${found(issue.input)}`;
  }
}

function mend(issue: Issue): string {
  switch (issue.code) {
    case 'invalid_type':
      return `write ${kindOf(issue.expected)}`;
    case 'invalid_value':
      return oneOf(issue.values);
    case 'too_small':
      return `write ${issue.inclusive ? 'at least' : 'more than'} ${issue.minimum}${countOf(issue.origin)}`;
    case 'too_big':
      return `write ${issue.inclusive ? 'at most' : 'less than'} ${issue.maximum}${countOf(issue.origin)}`;
    case 'invalid_format':
      if (issue.format === 'date') return 'write a date as year-month-day, 2026-12-01';
      return issue.pattern === '/^[xyz]{1,3}$/'
        ? 'write any of x y z'
        : `write a text of the form ${issue.pattern ?? issue.format}`;
    default:
      return 'see the JSON Schema of this file in templates/';
  }
}

const smallWord = (origin: string): string => (origin === 'array' || origin === 'string' ? 'short' : 'small');
const largeWord = (origin: string): string => (origin === 'array' || origin === 'string' ? 'long' : 'large');
const countOf = (origin: string): string =>
  origin === 'array' ? ' of them' : origin === 'string' ? ' characters' : '';

const oneOf = (values: readonly unknown[]): string => `write ${values.map((v) => JSON.stringify(v)).join(' or ')}`;

function kindOf(expected: string): string {
  const words: Record<string, string> = {
    string: 'a text in quotation marks',
    number: 'a number',
    int: 'a whole number',
    boolean: 'true or false',
    array: 'a list [ ... ]',
    tuple: 'a list [ ... ]',
    object: 'an object { ... }',
    record: 'an object { ... }',
  };
  return words[expected] ?? expected;
}

function found(input: unknown): string {
  if (typeof input === 'string') return quoted(input);
  if (input === null || typeof input === 'boolean' || typeof input === 'number') return String(input);
  return Array.isArray(input) ? 'a list' : 'an object';
}
