import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { size } from '../../src/cli/commands/size.js';
import { readTruss } from '../../src/readers/truss.js';

const folder = mkdtempSync(join(tmpdir(), 'size-'));
afterAll(() => rmSync(folder, { recursive: true }));
const EXAMPLE = 'examples/canopy/job.json';

async function run(options: Record<string, unknown>, job = EXAMPLE) {
  let [result, talk] = ['', ''];
  const terminal = {
    result: (s: string) => void (result += s),
    talk: (s: string) => void (talk += s),
    colour: false,
  } as unknown as Parameters<typeof size.run>[0]['terminal'];
  const status = await size.run({ arguments: [job], options, terminal });
  return { status, result, talk };
}

it('the canopy: words, data and a truss file agree', async () => {
  const out = join(folder, 'sized.json');
  const words = await run({ out });
  expect(words.status).toBe(0);
  const data = JSON.parse((await run({ json: true })).result);
  expect(data.format).toBe('strutwright-size/1');
  const truss = readTruss(readFileSync(out, 'utf8'), out).truss!;
  for (const { name, struts, to } of data.sections) {
    expect(words.result).toContain(name);
    for (const mark of struts) expect(truss.members.find((m) => m.mark === mark)!.section).toBe(to);
  }
  expect(data.massAfter_kg).toBeLessThan(data.massBefore_kg);
});

it('an existing file is never replaced', async () => {
  const out = join(folder, 'sized.json');
  const { status, talk } = await run({ out });
  expect(status).toBe(2);
  expect(talk).toContain('is there already');
});

it('a job that is not there is refused in one line', async () => {
  const { status, talk } = await run({}, join(folder, 'none.json'));
  expect(status).toBe(2);
  expect(talk.trim().split('\n').length).toBe(1);
});
