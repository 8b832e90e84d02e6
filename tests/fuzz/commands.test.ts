import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import { afterAll, describe, expect, it } from 'vitest';
import { listen } from '../cli/listen.js';
import { options } from './holds.js';
import { mutated } from './mutate.js';

const dir = mkdtempSync(join(tmpdir(), 'fuzz-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const at = (name: string): string => join(dir, name);

const JOB = `{ "format": "strutwright-job/1", "title": "T", "truss": "truss.json", "scale": 0.5, "forces": { "source": "analysis" },
  "loads": { "cases": [ { "name": "snow", "kind": "snow", "pressure_kN_per_m2": 1 } ] }, "struts": { "section": "beech-8" },
  "stock": { "bars": [ { "section": "beech-8", "length_mm": 1000, "price": 2.2 } ] }, "saw": { "step_mm": 0.5, "endFloat_mm": 0.75 },
  "nodes": { "system": "socket" }, "panels": { "thickness_mm": 3 }, "sheets": [ { "name": "s", "width_mm": 600, "height_mm": 400 } ] }`;
const TRUSS = `{ "format": "strutwright-truss/1", "units": "mm",
  "nodes": [ { "id": "A", "at": [0, 0, 0] }, { "id": "B", "at": [600, 0, 0] }, { "id": "C", "at": [300, 520, 0] }, { "id": "D", "at": [300, 180, 480] } ],
  "members": [ { "id": "S1", "ends": ["A", "B"], "force": 1 }, { "id": "S2", "ends": ["B", "C"], "force": 1 }, { "id": "S3", "ends": ["C", "A"], "force": 1 },
    { "id": "S4", "ends": ["A", "D"], "force": -1, "section": "beech-8" }, { "id": "S5", "ends": ["B", "D"], "force": -1 }, { "id": "S6", "ends": ["C", "D"], "force": -1 } ],
  "faces": [ { "id": "P1", "nodes": ["A", "B", "D"], "panel": true }, { "id": "P2", "nodes": ["A", "B", "C"] } ],
  "supports": [ { "node": "A", "fixed": "xyz" }, { "node": "B", "fixed": "yz" }, { "node": "C", "fixed": "z" } ],
  "loads": [ { "case": "given", "node": "D", "force": [0, 0, -5] } ] }`;
const OBJ =
  'o box\nv 0 0 0\nv 1 0 0\nv 1 1 0\nv 0 1 0\nv 0.5 0.5 1\ng legs\nl 1 2 3 4 1\nl 1 5\nl 2 5\nl 1 3\nl 2 4\nf 1 2 5\n';
const PIECES = 'mark,length_mm,quantity,section\nS1,450,4,beech-8\nS2,320.5,3,beech-8\nS3,120,2,beech-8\n';

/** What every command promises of every input: its exit status, and one line a fault. */
async function promises(...argv: string[]): Promise<void> {
  const heard = listen();
  const status = await heard.strutwright(...argv);
  expect([0, 1, 2], heard.talked).toContain(status);
  expect(heard.talked + heard.said).not.toMatch(/^\s+at .*:\d+:\d+\)?$/m);
  if (status === 2) {
    expect(heard.said).toBe('');
    for (const line of heard.talked.trimEnd().split('\n'))
      expect(line).toMatch(/^[^\p{Cc}]+: [^\p{Cc}]+: [^\p{Cc}]+$/u);
  }
}

/** A run of a whole command costs some ten times that of a reader. */
const SHARE = 5;
const fewer = { ...options, numRuns: Math.ceil(options.numRuns / SHARE) };

describe('a command never ends but as it promises, whatever its file', () => {
  it('check, with a damaged truss', { timeout: 3_600_000 }, async () => {
    writeFileSync(at('job.json'), JOB);
    await fc.assert(
      fc.asyncProperty(mutated(TRUSS), async (text) => {
        writeFileSync(at('truss.json'), text);
        await promises('check', at('job.json'), '--json');
      }),
      fewer,
    );
  });
  it('check, with a damaged job', { timeout: 3_600_000 }, async () => {
    writeFileSync(at('truss.json'), TRUSS);
    await fc.assert(
      fc.asyncProperty(mutated(JOB), async (text) => {
        writeFileSync(at('job.json'), text);
        await promises('check', at('job.json'), '--json');
      }),
      fewer,
    );
  });
  it('convert', { timeout: 3_600_000 }, () =>
    fc.assert(
      fc.asyncProperty(mutated(OBJ), async (text) => {
        writeFileSync(at('a.obj'), text);
        rmSync(at('out'), { recursive: true, force: true });
        await promises(
          'convert',
          at('a.obj'),
          '-o',
          at('out/t.json'),
          '--unit',
          'm',
          '--up',
          'z',
          '--split',
          '--find-faces',
        );
      }),
      fewer,
    ),
  );
  it('stock', { timeout: 3_600_000 }, () =>
    fc.assert(
      fc.asyncProperty(mutated(PIECES), async (text) => {
        writeFileSync(at('pieces.csv'), text);
        await promises('stock', at('pieces.csv'), '--bar', '1000', '--json');
      }),
      { ...options, numRuns: Math.ceil(options.numRuns / (10 * SHARE)) },
    ),
  );
});
