import { expect, it } from 'vitest';
import { MATERIALS } from '../../src/model/catalogue/materials/index.js';
import { SECTIONS } from '../../src/model/catalogue/sections/index.js';
import { listen } from './listen.js';

async function run(word?: string, ...flags: string[]) {
  const heard = listen();
  const status = await heard.strutwright('catalogue', ...(word === undefined ? [] : [word]), ...flags);
  return { status, result: heard.said, talk: heard.talked };
}

it('lists every section and material, each value with its source', async () => {
  const { sections, materials } = JSON.parse((await run(undefined, '--json')).result);
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
