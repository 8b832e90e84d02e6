import { expect, it } from 'vitest';
import { catalogue } from '../../src/cli/commands/catalogue.js';
import type { Terminal } from '../../src/cli/terminal/terminal.js';
import { MATERIALS } from '../../src/model/catalogue/materials/index.js';
import { SECTIONS } from '../../src/model/catalogue/sections/index.js';

async function run(word: string | undefined, options: Record<string, unknown> = {}) {
  let [result, talk] = ['', ''];
  const terminal: Terminal = {
    result: (s) => void (result += s),
    talk: (s) => void (talk += s),
    watched: false,
    colour: false,
    columns: 100,
  };
  const status = await catalogue.run({ arguments: word === undefined ? [] : [word], options, terminal });
  return { status, result, talk };
}

it('lists every section and material, each value with its source', async () => {
  const { sections, materials } = JSON.parse((await run(undefined, { json: true })).result);
  expect(sections.length).toBe(SECTIONS.size);
  expect(materials.length).toBe(MATERIALS.size);
  for (const m of materials)
    for (const v of m.values) expect(v.source.length, `${m.name} ${v.value}`).toBeGreaterThan(5);
});

it('C24: the class, its bars, and where the strengths stand', async () => {
  const { result } = await run('c24');
  expect(result).toContain('C24-45x95');
  expect(result).toContain('fmk 24 MPa');
  expect(result).toContain('EN 338:2016 table 1');
  expect(result).not.toContain('beech');
});

it('a word that nothing has is refused in one line', async () => {
  const { status, talk } = await run('unobtainium');
  expect(status).toBe(2);
  expect(talk.trim().split('\n').length).toBe(1);
});
