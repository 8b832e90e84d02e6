import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { jsonSchemas } from '../../src/model/json-schemas.js';
import { assess } from '../../src/pipeline/assess.js';
import { readJob } from '../../src/readers/job.js';
import { readTruss } from '../../src/readers/truss.js';

const root = new URL('../../templates/', import.meta.url);
const names = readdirSync(root, { withFileTypes: true })
  .filter((e) => e.isDirectory())
  .map((e) => e.name);
const text = (path: string): string => readFileSync(new URL(path, root), 'utf8');
const keys = Object.keys((jsonSchemas()['job.schema.json'] as { properties: object }).properties);

it('there is one for a table, one for a table in inches, one for a garden', () =>
  expect(names).toEqual(expect.arrayContaining(['garden-pavilion', 'table-model', 'table-model-us'])));

describe.each(names)('template %s', (name) => {
  const job = readJob(text(`${name}/job.json`), 'job.json');
  const truss = readTruss(text(`${name}/truss.json`), 'truss.json');
  it('reads without a fault', () => expect([...job.faults, ...truss.faults]).toEqual([]));
  it('holds every key of a job, each under its explanation', () => {
    const lines = text(`${name}/job.json`).split('\n');
    for (const key of keys.filter((k) => k !== '$schema')) {
      const at = lines.findIndex((line) => line.startsWith(`  "${key}":`));
      expect(at, key).toBeGreaterThan(0);
      expect(lines[at - 1], key).toMatch(/^ {2}\/\/ /);
    }
  });
  it('has no stop but the one that asks for a test of your own', () => {
    const { findings } = assess(truss.truss!, job.job!);
    const stops = findings.filter((f) => f.level === 'stop').map((f) => f.code);
    expect(stops).toEqual(name === 'garden-pavilion' ? [expect.any(String)] : []);
  });
});

it('the truss in inches is the one in millimetres', () => {
  const [mm, inches] = ['table-model', 'table-model-us'].map((n) => readTruss(text(`${n}/truss.json`), n).truss!);
  expect(inches!.nodes).toHaveLength(mm!.nodes.length);
  // Inches are written to a millionth: 2.54e-5 mm.
  inches!.nodes.forEach((node, i) => {
    node.at.forEach((v, k) => {
      expect(Math.abs(v - mm!.nodes[i]!.at[k]!)).toBeLessThan(2e-5);
    });
  });
});
