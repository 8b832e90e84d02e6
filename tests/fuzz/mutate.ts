import fc from 'fast-check';

/** What breaks parsers: extremes, names of the language itself, text that is markup, formula, path or not printable. */
const NASTY = [
  '0',
  '-0',
  '1e308',
  '-1e308',
  '1e-320',
  '1e999',
  'NaN',
  '9007199254740993',
  '-1',
  '0.1',
  '__proto__',
  'constructor',
  'toString',
  'hasOwnProperty',
  'null',
  'true',
  '[]',
  '{}',
  '""',
  '"',
  "'",
  '\\',
  '\\u0000',
  '\\ud800',
  ',',
  ';',
  ':',
  '/*',
  '//',
  '=HYPERLINK("x")',
  '+1',
  '@x',
  '<script>alert(1)</script>',
  ']]>',
  '../../etc/passwd',
  'CON',
  '\u202eabc',
  '\u0000',
  '\u0007',
  '\ufeff',
  '\u2028',
  '\r',
  '\n',
  '\t',
  '😀',
  'é',
  'x'.repeat(300),
  '['.repeat(100),
  '1'.repeat(400),
];

/** A file with one to six things done to it: a piece cut, doubled, moved, swapped for something nasty; a digit changed. */
export const mutated = (source: string): fc.Arbitrary<string> => {
  const place = fc.nat({ max: source.length });
  const edit = fc.oneof(
    fc.record({ kind: fc.constant('cut' as const), at: place, length: fc.integer({ min: 1, max: 40 }) }),
    fc.record({ kind: fc.constant('double' as const), at: place, length: fc.integer({ min: 1, max: 200 }), to: place }),
    fc.record({ kind: fc.constant('insert' as const), at: place, text: fc.constantFrom(...NASTY) }),
    fc.record({ kind: fc.constant('token' as const), pick: fc.nat(), text: fc.constantFrom(...NASTY) }),
    fc.record({ kind: fc.constant('number' as const), pick: fc.nat(), text: fc.constantFrom(...NASTY.slice(0, 10)) }),
    fc.record({ kind: fc.constant('end' as const), at: place }),
  );
  return fc.array(edit, { minLength: 1, maxLength: 6 }).map((edits) => {
    let text = source;
    for (const e of edits) {
      if (e.kind === 'cut') text = text.slice(0, e.at) + text.slice(e.at + e.length);
      if (e.kind === 'double') text = text.slice(0, e.to) + text.slice(e.at, e.at + e.length) + text.slice(e.to);
      if (e.kind === 'insert') text = text.slice(0, e.at) + e.text + text.slice(e.at);
      if (e.kind === 'end') text = text.slice(0, Math.max(1, e.at));
      if (e.kind === 'token') text = replaceNth(text, /"[^"\n]*"|[A-Za-z_]+/g, e.pick, e.text);
      if (e.kind === 'number') text = replaceNth(text, /-?\d+(\.\d+)?/g, e.pick, e.text);
    }
    return text;
  });
};

function replaceNth(text: string, pattern: RegExp, pick: number, by: string): string {
  const found = [...text.matchAll(pattern)];
  const match = found[pick % Math.max(1, found.length)];
  return match ? text.slice(0, match.index) + by + text.slice(match.index + match[0].length) : text;
}

/** Runs of each property: 500 in every test run, more where the environment asks for a longer campaign. */
export const RUNS = Number(process.env.FUZZ_RUNS ?? 500);
/** The same files in every run, other ones where the environment gives another seed. */
export const SEED = Number(process.env.FUZZ_SEED ?? 20261201);
