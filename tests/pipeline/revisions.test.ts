import { createHash } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { makePack } from '../../dist/pipeline/make.js';
import { inchFraction } from '../../src/documents/kit/units.js';
import type { Vec3 } from '../../src/maths/vec3.js';
import { defaultJob, type Job } from '../../src/model/job/index.js';
import type { Truss } from '../../src/model/truss.js';
import { comparePacks } from '../../src/pipeline/compare.js';
import { comparisonPaper } from '../../src/pipeline/comparison-paper.js';
import { type Manifest, papersOf } from '../../src/pipeline/manifest.js';
import type { ReadPack } from '../../src/pipeline/read-pack.js';
import { readTruss } from '../../src/readers/truss.js';
import { onFile, textOf } from '../documents/pdf.js';

// An invented double tripod: D above, E below the triangle A B C.
const text = (d: string, extra = ''): string => `{ "format": "strutwright-truss/1", "units": "mm",
  "nodes": [ { "id": "A", "at": [0, 0, 0] }, { "id": "B", "at": [300, 0, 0] }, { "id": "C", "at": [150, 260, 0] },
    { "id": "D", "at": ${d} }, { "id": "E", "at": [150, 90, -240] } ],
  "members": [ { "id": "S1", "ends": ["A", "B"] }, { "id": "S2", "ends": ["B", "C"] }, { "id": "S3", "ends": ["C", "A"] },
    { "id": "S4", "ends": ["A", "D"] }, { "id": "S5", "ends": ["B", "D"] }, { "id": "S6", "ends": ["C", "D"] },
    { "id": "S7", "ends": ["A", "E"] }, { "id": "S8", "ends": ["B", "E"] }, { "id": "S9", "ends": ["C", "E"] }${extra} ],
  "faces": [ { "id": "P1", "nodes": ["A", "B", "D"], "panel": true }, { "id": "P2", "nodes": ["A", "B", "E"], "panel": true } ] }`;
const trussOf = (source: string): Truss => readTruss(source, 't.json').truss!;
const job = (revision: string): Job => ({ ...defaultJob('Double tripod'), revision });

interface Made {
  readonly manifest: Manifest;
  readonly files: Map<string, Uint8Array>;
  readonly pack: ReadPack;
}

async function make(truss: Truss, ofJob: Job, since?: Manifest): Promise<Made> {
  const files = new Map<string, Uint8Array>();
  const manifest = await makePack(truss, ofJob, {
    write: (path, bytes) => void files.set(path, bytes),
    ...(since ? { since } : {}),
  });
  const pack: ReadPack = {
    folder: '',
    manifest: { ...manifest, parts: manifest.parts.map((p) => ({ ...p, files: [...p.files] })) },
    text: async (path) => {
      const bytes = files.get(path);
      return bytes ? new TextDecoder().decode(bytes) : null;
    },
  };
  return { manifest, files, pack };
}

const stl = (made: Made): string[] => [...made.files.keys()].filter((p) => /^nodes\/stl\//.test(p)).sort();
const hash = (bytes: Uint8Array | undefined): string => createHash('sha256').update(bytes!).digest('hex');

let [first, second]: Made[] = [];
beforeAll(async () => {
  first = await make(trussOf(text('[150, 90, 240]')), job('A'));
  second = await make(trussOf(text('[150, 90, 250]')), job('B'), first.manifest);
}, 120_000);

it('is compared on the paper and in the units of its own papers, unless another paper is asked for', async () => {
  const us = job('B');
  const asked = { ...us.output, paper: 'Letter' as const, units: 'US' as const, fractions: true };
  expect(papersOf({ ...us, output: asked })).toEqual({ paper: 'Letter', units: 'US', fractions: true });
  const after = { ...second!.pack, manifest: { ...second!.pack.manifest, papers: papersOf({ ...us, output: asked }) } };
  const c = await comparePacks(first!.pack, after);
  const s4 = c.changed.find((p) => p.mark === 'S4')!.what.find((d) => d.name === 'cut_length_mm')!;
  // Down to the thirty-second below, as a saw is set; 1 in = 25.4 mm (NIST SP 811 (2008), appendix B.8).
  const saws = [s4.from, s4.to].map((v) => inchFraction(Math.floor((Number(v) / 25.4) * 32) / 32));
  const [letter, a4] = [
    await comparisonPaper(c, first!.pack, after),
    await comparisonPaper(c, first!.pack, after, 'A4'),
  ];
  expect(textOf(letter).replaceAll(/\s+/g, ' ')).toContain(`cut length ${saws.join(' to ')}`);
  expect(onFile(letter, 'pdfinfo', ['%'])).toContain('(letter)');
  expect(onFile(a4, 'pdfinfo', ['%'])).toContain('(A4)');
  const old = { ...after, manifest: { ...after.manifest, papers: papersOf(us) } };
  expect(textOf(await comparisonPaper(c, first!.pack, old)).replaceAll(/\s+/g, ' ')).toContain(
    `cut length ${s4.from} to ${s4.to}`,
  );
});

describe('a pack since an earlier one, after the top node was raised by 10 mm', () => {
  it('compares part by part: what meets at D and every node of it changed, the rest is unchanged', async () => {
    const c = await comparePacks(first!.pack, second!.pack);
    const names = (parts: readonly { kind: string; mark: string }[]): string[] =>
      parts
        .filter((p) => ['strut', 'node', 'panel'].includes(p.kind))
        .map((p) => `${p.kind} ${p.mark}`)
        .sort();
    expect(names(c.unchanged)).toEqual([
      'node E',
      'panel P2',
      ...['1', '2', '3', '7', '8', '9'].map((n) => `strut S${n}`),
    ]);
    expect(names(c.changed)).toEqual([
      'node A',
      'node B',
      'node C',
      'node D',
      'panel P1',
      'strut S4',
      'strut S5',
      'strut S6',
    ]);
    expect([c.relabelled, c.new, c.withdrawn]).toEqual([[], [], []]);
    // The strut grew by as much as its axis (by Pythagoras) less what its setbacks moved, to the saw's step of 0.5 mm.
    const s4 = c.changed.find((p) => p.mark === 'S4')!.what.find((w) => w.name === 'cut_length_mm')!;
    const grown = Math.hypot(150, 90, 250) - Math.hypot(150, 90, 240);
    expect(Number(s4.to) - Number(s4.from)).toBeGreaterThan(grown - 2);
    expect(Number(s4.to) - Number(s4.from)).toBeLessThan(grown + 2);
  });
  it('writes and plans only what must be made again', () => {
    expect(stl(first!)).toHaveLength(5);
    expect(stl(second!)).toEqual(['A', 'B', 'C', 'D'].map((m) => `nodes/stl/${m}.stl`));
    const plan = new TextDecoder().decode(second!.files.get('struts/stock-plan.json'));
    expect([...plan.matchAll(/"mark": "(S\d)"/g)].map((m) => m[1]).sort()).toEqual(['S4', 'S5', 'S6']);
    expect(second!.manifest.since).toEqual({ title: 'Double tripod', revision: 'A' });
    expect(second!.manifest.withheld).toEqual([]);
  });
  it('lists every part all the same, each with the letter of its own last change', () => {
    const revisions = new Map(second!.manifest.parts.map((p) => [p.mark, p.revision]));
    expect(revisions.size).toBeGreaterThanOrEqual(16);
    expect(['E', 'S1', 'P2'].map((m) => revisions.get(m))).toEqual(['A', 'A', 'A']);
    expect(['D', 'S4', 'P1'].map((m) => revisions.get(m))).toEqual(['B', 'B', 'B']);
  });
});

it('a part that did not change has the same bytes, wherever the truss was moved and turned', async () => {
  // A quarter turn about z and a move: exact in binary.
  const moved = first!.manifest;
  const truss = trussOf(text('[150, 90, 240]'));
  const turned: Truss = {
    ...truss,
    nodes: truss.nodes.map((n) => ({ ...n, at: [1024 - n.at[1], n.at[0] - 512, n.at[2] + 64] as Vec3 })),
  };
  const again = await make(turned, job('A'));
  for (const path of stl(first!)) expect(hash(again.files.get(path))).toBe(hash(first!.files.get(path)));
  const digests = (m: Manifest): (string | null)[] => m.parts.filter((p) => p.kind !== 'panel').map((p) => p.digest);
  expect(digests(again.manifest)).toEqual(digests(moved));
});

/** A pack of nothing but its manifest's parts, given as "kind mark digest form". */
const packOf = (...parts: string[]): ReadPack => ({
  folder: '',
  manifest: {
    format: 'strutwright-pack/1',
    title: 'T',
    revision: 'A',
    date: null,
    papers: papersOf(job('A')),
    parts: parts.map((text) => {
      const [kind, mark, digest, form] = text.split(' ');
      return {
        kind: kind as 'strut',
        mark: mark!,
        digest: digest === '-' ? null : digest!,
        form: form === '-' ? null : form!,
        revision: 'A',
        files: [],
      };
    }),
  },
  text: async () => null,
});

it('tells relabelled from changed, new and withdrawn; what was never made is no change', async () => {
  const before = packOf(
    'strut S1 d1 f1',
    'strut S2 d2 f2',
    'strut S3 d3 f3',
    'node A d4 f4',
    'node B - -',
    'panel P d5 f5',
  );
  const after = packOf(
    'strut S1 d1 f1',
    'strut T2 x2 f2',
    'strut S9 d9 f9',
    'node A x4 f4',
    'node B - -',
    'panel P x5 x5',
  );
  const c = await comparePacks(before, after);
  expect(c.unchanged).toEqual([
    { kind: 'strut', mark: 'S1' },
    { kind: 'node', mark: 'B' },
  ]);
  expect(c.relabelled).toEqual([
    { kind: 'node', mark: 'A', was: 'A' },
    { kind: 'strut', mark: 'T2', was: 'S2' },
  ]);
  expect(c.changed).toEqual([{ kind: 'panel', mark: 'P', what: [] }]);
  expect(c.new).toEqual([{ kind: 'strut', mark: 'S9' }]);
  expect(c.withdrawn).toEqual([{ kind: 'strut', mark: 'S3' }]);
  expect(c.totals['relabelled']).toEqual({ strut: 1, node: 1, panel: 0, cap: 0, guide: 0, gauge: 0 });
});

it('lists caps and guides of unchanged hubs as unchanged, without files', async () => {
  const own: Job = {
    ...job('A'),
    struts: { ...job('A').struts, ends: { 'S7@A': 'drop-in' } },
    nodes: { ...job('A').nodes, systems: { E: 'drilled-ball' } },
  };
  const source = trussOf(text('[150, 90, 240]'));
  const one = await make(source, own);
  const kinds = (m: Made, kind: string): string[] => m.manifest.parts.filter((p) => p.kind === kind).map((p) => p.mark);
  expect(kinds(one, 'cap')).toEqual(['A.cap-S7']);
  expect(kinds(one, 'guide')).toEqual(['E.guide-A', 'E.guide-B']);
  const two = await make(source, { ...own, revision: 'B' }, one.manifest);
  expect(kinds(two, 'cap')).toEqual(kinds(one, 'cap'));
  expect(kinds(two, 'guide')).toEqual(kinds(one, 'guide'));
  for (const p of two.manifest.parts.filter((x) => x.kind === 'cap' || x.kind === 'guide')) {
    expect(p.files).toEqual([]);
    expect(p.revision).toBe('A');
  }
  const c = await comparePacks(one.pack, two.pack);
  expect([c.changed, c.new, c.withdrawn].flat()).toEqual([]);
}, 120_000);

it('prints nothing of a drilled cube, withholds nothing of it, and knows it again', async () => {
  const own: Job = { ...job('A'), nodes: { ...job('A').nodes, systems: { E: 'drilled-cube' } } };
  const source = trussOf(text('[150, 90, 240]'));
  const one = await make(source, own);
  const part = (m: Made) => m.manifest.parts.filter((p) => p.mark === 'E' || p.mark.startsWith('E.'));
  expect(part(one)).toMatchObject([{ mark: 'E', kind: 'node', files: [], revision: 'A' }]);
  expect(part(one)[0]!.digest).toMatch(/./);
  expect(one.manifest.withheld).not.toContain('E');
  expect(stl(one).filter((p) => /\/E\./.test(p))).toEqual([]);
  const table = new TextDecoder().decode(one.files.get('nodes/drilling.csv'));
  expect(
    table
      .trim()
      .split('\n')
      .slice(1)
      .map((line) => line.split(',').slice(0, 2).join()),
  ).toEqual(['E,S7', 'E,S8', 'E,S9']);
  expect(one.files.has('nodes/drilling-templates.pdf')).toBe(true);
  const two = await make(source, { ...own, revision: 'B' }, one.manifest);
  expect(part(two)).toMatchObject([{ mark: 'E', revision: 'A', digest: part(one)[0]!.digest }]);
}, 120_000);
