import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { listen } from './listen.js';
import { runCli } from './run-cli.js';

const dir = mkdtempSync(join(tmpdir(), 'as-built-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));
const at = (name: string): string => join(dir, name);
const write = (name: string, text: string): string => {
  writeFileSync(at(name), text);
  return at(name);
};

const heard = listen();
const { strutwright } = heard;

/** A square of 500 mm with both diagonals on held corners (invented): one loop, sides 1 and diagonals -√2. */
const truss = (extra: object = {}) => ({
  format: 'strutwright-truss/1',
  units: 'mm',
  nodes: [
    { id: 'A1', at: [0, 0, 0] },
    { id: 'A2', at: [500, 0, 0] },
    { id: 'A3', at: [500, 500, 0] },
    { id: 'A4', at: [0, 500, 0] },
  ],
  members: [
    { id: 'S1', ends: ['A1', 'A2'] },
    { id: 'S2', ends: ['A2', 'A3'] },
    { id: 'S3', ends: ['A3', 'A4'] },
    { id: 'S4', ends: ['A4', 'A1'] },
    { id: 'S5', ends: ['A1', 'A3'] },
    { id: 'S6', ends: ['A2', 'A4'] },
  ],
  supports: [
    { node: 'A1', fixed: 'xyz' },
    { node: 'A2', fixed: 'yz' },
    { node: 'A3', fixed: 'z' },
    { node: 'A4', fixed: 'z' },
  ],
  ...extra,
});
write('truss.json', JSON.stringify(truss()));
const job = write(
  'job.json',
  JSON.stringify({ format: 'strutwright-job/1', title: 'Square', truss: 'truss.json', saw: { step_mm: 0.001 } }),
);

interface Row {
  readonly mark: string;
  readonly planned_mm: number;
  readonly corrected_mm: number;
}
const corrected = async (name: string, table: string): Promise<Map<string, Row>> => {
  expect(await strutwright('as-built', job, write(name, table), '--json')).toBe(0);
  return new Map((JSON.parse(heard.said) as Row[]).map((r) => [r.mark, r]));
};

describe('strutwright as-built', () => {
  it('gives new lengths for the struts that were not measured, so that the loop closes', async () => {
    const plain = await corrected('one.csv', 'mark,length_mm\nS1,1\n');
    const planned = [...plain.values()].find((r) => r.mark === 'S2')!.planned_mm;
    const rows = await corrected('long.csv', `mark,length_mm\nS1,${(planned + 2).toFixed(3)}\n`);
    expect([...rows.keys()]).toEqual(['S2', 'S3', 'S4', 'S5', 'S6']);
    // e1 + e2 + e3 + e4 - √2 (e5 + e6) = 0 with e1 = 2: the least change is -2 s_i / (3 + 4).
    for (const mark of ['S2', 'S3', 'S4']) {
      const r = rows.get(mark)!;
      expect(Math.abs(r.corrected_mm - r.planned_mm + 2 / 7)).toBeLessThan(0.01);
    }
    for (const mark of ['S5', 'S6']) {
      const r = rows.get(mark)!;
      expect(Math.abs(r.corrected_mm - r.planned_mm - (2 * Math.SQRT2) / 7)).toBeLessThan(0.01);
    }
  });

  it('prints them as a table without --json', async () => {
    expect(await strutwright('as-built', job, write('t.csv', 'mark,length_mm\nS1,480\n'))).toBe(0);
    const lines = heard.said.trim().split('\n');
    expect(lines[0]).toBe('mark,cut_length_mm,planned_mm');
    expect(lines).toHaveLength(6);
    expect(lines[1]).toMatch(/^S2,\d+\.\d{3},\d+\.\d{3}$/);
  });

  it('from two measured nodes follows their distance, from one alone changes nothing', async () => {
    const two = await corrected('two.csv', 'node,x_mm,y_mm,z_mm\nA1,0,0,0\nA2,503,4,0\n');
    const s1 = two.get('S1')!;
    expect(Math.abs(s1.corrected_mm - s1.planned_mm - (Math.hypot(503, 4) - 500))).toBeLessThan(0.01);
    const one = await corrected('onenode.csv', 'node,x_mm,y_mm,z_mm\nA2,503,4,0\n');
    expect(one.size).toBe(6);
    for (const r of one.values()) expect(Math.abs(r.corrected_mm - r.planned_mm)).toBeLessThan(0.01);
  });

  it.each<[string, string, RegExp]>([
    [
      'an unknown mark, with the nearest',
      'mark,length_mm\nS11,480\n',
      /:2:1: "S11" is no strut of the truss: did you mean S1/,
    ],
    ['an unknown node', 'node,x_mm,y_mm,z_mm\nB1,0,0,0\n', /:2:1: "B1" is no node of the truss/],
    ['a number in another base', 'mark,length_mm\nS1,0x10\n', /:2:1: "0x10" is no measurement in mm/],
    ['a mark measured twice', 'mark,length_mm\nS1,480\nS1,481\n', /:3:1: S1 is measured twice/],
    ['columns without names', 'S1,480\n', /:1:1: has no rows under a header line/],
    ['nothing measured', 'mark,length_mm\n', /:1:1: has no rows under a header line/],
  ])('refuses %s', async (_, table, said) => {
    expect(await strutwright('as-built', job, write('bad.csv', table))).toBe(2);
    expect(heard.talked).toMatch(said);
    expect(heard.said).toBe('');
  });

  it('refuses a table that is not there', async () => {
    expect(await strutwright('as-built', job, at('none.csv'))).toBe(2);
    expect(heard.talked).toContain('none.csv');
  });
});

describe('what is wrong with the building of a truss, on the command line', () => {
  const check = async (name: string, t: object, more: object = {}) => {
    write(`${name}.truss.json`, JSON.stringify(t));
    const path = write(
      `${name}.json`,
      JSON.stringify({ format: 'strutwright-job/1', title: 'T', truss: `${name}.truss.json`, ...more }),
    );
    return path;
  };

  it('a truss in two pieces is named, and flagged', async () => {
    const base = truss();
    const twice = {
      ...base,
      nodes: [...base.nodes, ...base.nodes.map((n) => ({ id: `B${n.id}`, at: [n.at[0]! + 2000, n.at[1]!, n.at[2]!] }))],
      members: [...base.members, ...base.members.map((m) => ({ id: `B${m.id}`, ends: m.ends.map((e) => `B${e}`) }))],
    };
    const path = await check('twice', twice);
    const made = runCli(['make', path, '-o', at('twice-pack')]);
    expect(made.status).toBe(1);
    const { findings } = JSON.parse(readFileSync(join(at('twice-pack'), 'check.json'), 'utf8'));
    const found = findings.find((f: { code: string }) => f.code === 'truss-in-pieces');
    expect(found).toMatchObject({ level: 'warn', subject: 'truss', value: 2, limit: 1 });
    expect(found.message).toContain('in 2 pieces that no strut joins');
  }, 300_000);

  it('a step that nothing can make stable holds the pack', async () => {
    const square = (z: number, name: string) =>
      [
        [0, 0],
        [500, 0],
        [500, 500],
        [0, 500],
      ].map(([x, y], i) => ({ id: `${name}${i + 1}`, at: [x!, y!, z] }));
    const table = {
      format: 'strutwright-truss/1',
      units: 'mm',
      nodes: [...square(0, 'A'), ...square(500, 'B')],
      members: [
        ...[1, 2, 3, 4].map((i) => ({ id: `S${i}`, ends: [`A${i}`, `B${i}`] })),
        ...[1, 2, 3, 4].map((i) => ({ id: `S${i + 4}`, ends: [`B${i}`, `B${(i % 4) + 1}`] })),
      ],
      supports: [1, 2, 3, 4].map((i) => ({ node: `A${i}`, fixed: 'xyz' })),
    };
    const path = await check('table', table, { analysis: { joints: 'pinned' } });
    const made = runCli(['make', path, '-o', at('table-pack')]);
    expect(made.status).toBe(1);
    expect(made.out + made.talk).toMatch(/what stands after step \d+ can move freely/);
  }, 300_000);
});
