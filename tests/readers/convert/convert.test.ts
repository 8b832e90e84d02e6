import { describe, expect, it } from 'vitest';
import { writeTrussJson } from '../../../src/documents/truss/truss-json.js';
import type { Vec3 } from '../../../src/maths/vec3.js';
import { bareLine, type RawGeometry } from '../../../src/model/raw-geometry.js';
import { type Converted, convertGeometry } from '../../../src/readers/convert/convert.js';
import { readMarkMemory, writeMarkMemory } from '../../../src/readers/convert/mark-memory.js';
import type { ConvertOptions } from '../../../src/readers/convert/options.js';
import { readTruss } from '../../../src/readers/truss.js';

const drawing = (lines: readonly (readonly [Vec3, Vec3, string?])[], loops: readonly Vec3[][] = []): RawGeometry => ({
  unit: null,
  up: null,
  points: [],
  lines: lines.map(([a, b, layer]) => bareLine(a, b, layer ?? null)),
  loops: loops.map((points) => ({ points, layer: null })),
  leftOut: new Map(),
});
const OPTIONS: ConvertOptions = {
  unit: 'mm',
  up: 'z',
  merge: null,
  split: false,
  findFaces: false,
  panels: false,
  forces: [],
  memory: null,
};
const convert = (raw: RawGeometry, options: Partial<ConvertOptions> = {}): Converted =>
  convertGeometry(raw, { ...OPTIONS, ...options });

// An invented tripod with a ring: four nodes, six struts.
const [A, B, C, D]: Vec3[] = [
  [0, 0, 0],
  [100, 0, 0],
  [50, 90, 0],
  [50, 30, 80],
];
const tripod = (top: Vec3 = D!): [Vec3, Vec3, string?][] => [
  [A!, B!, 'ring'],
  [B!, C!, 'ring'],
  [C!, A!, 'ring'],
  [A!, top],
  [B!, top],
  [C!, top],
];

describe('ends', () => {
  it('that coincide become one node, marked from the ground up', () => {
    const { truss, report } = convert(drawing(tripod()));
    expect(truss.nodes).toEqual([
      { mark: 'N001', at: A },
      { mark: 'N002', at: B },
      { mark: 'N003', at: C },
      { mark: 'N004', at: D },
    ]);
    expect(truss.members.map((m) => [m.mark, ...m.ends, m.group])).toEqual([
      ['S001', 'N001', 'N002', 'ring'],
      ['S002', 'N003', 'N001', 'ring'],
      ['S003', 'N001', 'N004', null],
      ['S004', 'N002', 'N003', 'ring'],
      ['S005', 'N002', 'N004', null],
      ['S006', 'N003', 'N004', null],
    ]);
    expect(report).toMatchObject({ nodes: 4, struts: 6, merged: { points: 8, farthest_mm: 0 }, freeEnds: [] });
  });
  it('that are apart by less than the tolerance meet in the middle, by more stay free', () => {
    const off: [Vec3, Vec3][] = [
      [A!, B!],
      [[100.2, 0, 0], C!],
    ];
    expect(convert(drawing(off), { merge: 0.5 }).truss.nodes[1]!.at).toEqual([100.1, 0, 0]);
    const { truss, report } = convert(drawing(off), { merge: 0.1 });
    expect(truss.nodes).toHaveLength(4);
    expect(report.freeEnds).toHaveLength(4);
  });
  it('are turned and converted: y up in feet', () => {
    // A rotation by +90° about x takes y to z; 1 ft = 304.8 mm exactly (NIST SP 811).
    const { truss } = convert(
      drawing([
        [
          [1, 2, 3],
          [0, 0, 0],
        ],
      ]),
      { unit: 'ft', up: 'y' },
    );
    expect(truss.nodes.map((n) => n.at)).toEqual([
      [0, 0, 0],
      [304.8, -914.4, 609.6],
    ]);
  });
});

describe('what cannot be a strut or a face', () => {
  it('is dropped and counted', () => {
    const { truss, report } = convert(
      drawing(
        [...tripod(), [B!, A!], [A!, A!]],
        [
          [A!, B!, C!],
          [C!, B!, A!],
          [A!, B!, B!],
        ],
      ),
    );
    expect(truss.members).toHaveLength(6);
    expect(truss.faces).toHaveLength(1);
    expect(report.dropped).toEqual({
      strutsWithoutLength: 1,
      doubleStruts: 1,
      facesWithoutArea: 1,
      doubleFaces: 1,
      nodesAtOnePlace: 0,
    });
  });
  it('a mesh without lines has struts along the edges of its faces', () => {
    const { truss, report } = convert(
      drawing(
        [],
        [
          [A!, B!, D!],
          [B!, C!, D!],
        ],
      ),
      { panels: true },
    );
    expect(truss.members).toHaveLength(5);
    expect(report.strutsFromFaces).toBe(5);
    expect(truss.faces.every((f) => f.panel)).toBe(true);
  });
});

describe('crossings', () => {
  const cross: [Vec3, Vec3][] = [
    [
      [0, 0, 0],
      [100, 100, 0],
    ],
    [
      [100, 0, 0],
      [0, 100, 0],
    ],
    [
      [50, 50, 0],
      [50, 50, 100],
    ],
    [
      [0, 50, 0],
      [100, 50, 0],
    ],
  ];
  it('are told, and left where nobody asks', () => {
    const { truss, report } = convert(drawing(cross));
    expect(truss.members).toHaveLength(4);
    expect(report.left).toEqual({ crossings: 3, nodesOnStruts: 3 });
  });
  it('become one node with every strut split there', () => {
    const { truss, report } = convert(drawing(cross), { split: true });
    expect(truss.members).toHaveLength(7);
    expect(truss.nodes).toHaveLength(8);
    expect(report.left).toEqual({ crossings: 0, nodesOnStruts: 0 });
    expect(report.split.struts).toBe(3);
  });
  it('without a node there get one', () => {
    const { truss, report } = convert(drawing([cross[0]!, cross[1]!, cross[3]!]), { split: true });
    expect(truss.members).toHaveLength(6);
    expect(truss.nodes.filter((n) => n.at[0] === 50 && n.at[1] === 50)).toHaveLength(1);
    expect(report.split).toEqual({ crossings: 1, struts: 3 });
  });
});

it('finds the faces between lines', () => {
  const { truss, report } = convert(drawing(tripod()), { findFaces: true });
  expect(truss.faces).toHaveLength(4);
  expect(report.facesFound).toBe(4);
});

it('gives forces by node pair, in either order, and names those without a strut', () => {
  const { truss, report } = convert(drawing(tripod()), {
    forces: [
      { nodes: ['N004', 'N001'], force: -5, line: 2 },
      { nodes: ['N001', 'N009'], force: 1, line: 3 },
    ],
  });
  expect(truss.members.find((m) => m.mark === 'S003')!.force).toBe(-5);
  expect(report.forces).toEqual({ given: 2, unmatched: ['N001 to N009'] });
});

describe('marks after a change of the drawing', () => {
  const first = convert(drawing(tripod()));
  const byEnds = (c: Converted): Map<string, string> =>
    new Map(c.truss.members.map((m) => [[...m.ends].sort().join(), m.mark]));

  it('stay with a node that moved a little, and with its struts, whatever the order of the lines', () => {
    const again = convert(drawing([...tripod([55, 33, 90])].reverse()), { memory: first.memory });
    expect(again.truss.nodes.find((n) => n.mark === 'N004')!.at).toEqual([55, 33, 90]);
    expect(byEnds(again)).toEqual(byEnds(first));
    expect(again.report.marks).toEqual({ kept: 10, new: 0, withdrawn: [], prefixed: false });
  });
  it('leave a gap where a part went, and never come back on another', () => {
    const without = convert(drawing(tripod().slice(0, 5)), { memory: first.memory });
    expect(without.report.marks.withdrawn).toEqual(['S006']);
    const E: Vec3 = [300, 0, 0];
    const more = convert(drawing([...tripod().slice(0, 5), [B!, E]]), { memory: without.memory });
    expect(more.truss.nodes.map((n) => n.mark)).toEqual(['N001', 'N002', 'N005', 'N003', 'N004']);
    expect(more.truss.members.map((m) => m.mark).sort()).toEqual(['S001', 'S002', 'S003', 'S004', 'S005', 'S007']);
    expect(more.memory.withdrawn).toEqual(['S006']);
  });
  it('are read from what was written', () => {
    expect(readMarkMemory(writeMarkMemory(first.memory), 'm')).toEqual({ memory: first.memory, faults: [] });
    const bad = writeMarkMemory(first.memory).replace('"N001"', '"../N"');
    expect(readMarkMemory(bad, 'm').faults[0]!.what).toBe('the mark "../N" is not a mark');
    const hidden = writeMarkMemory(first.memory).replace('"N001"', '"\u2028N001"');
    expect(readMarkMemory(hidden, 'm').faults[0]!.what).toBe('the mark "\\u{2028}N001" is not a mark');
  });
});

it('what is written is a sound truss file that reads back the same', () => {
  const { truss } = convert(drawing(tripod(), [[A!, B!, C!]]), { unit: 'in', panels: true });
  expect(readTruss(writeTrussJson(truss), 't.json')).toEqual({ truss, faults: [] });
});
