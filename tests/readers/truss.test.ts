import { describe, expect, it } from 'vitest';
import { sayFault } from '../../src/readers/fault.js';
import { readTruss } from '../../src/readers/truss.js';

// An invented tetrahedron with every key that the format knows.
const WHOLE = `{
  // comments are allowed
  "$schema": "truss.schema.json",
  "format": "strutwright-truss/1",
  "units": "in",
  "nodes": [ { "id": "A1", "at": [0, 0, 0] }, { "id": "A2", "at": [1, 0, 0] }, { "id": "A3", "at": [0, 1, 0] }, { "id": "A4", "at": [0, 0, 2] } ],
  "members": [
    { "id": "S1", "ends": ["A1", "A2"], "force": -120.5, "section": "beech-8", "area_mm2": 50.3, "modulus_MPa": 13000, "roll_deg": 90, "group": "ring" },
    { "id": "S2", "ends": ["A1", "A3"] }
  ],
  "faces": [ { "id": "P1", "nodes": ["A1", "A2", "A3"], "panel": true, "group": "roof" }, { "id": "P2", "nodes": ["A4", "A2", "A1"] } ],
  "cells": [ { "id": "C1", "faces": ["P1", "P2"] } ],
  "reciprocal": { "newtonPerArea": 2, "vertices": [ { "cell": "C1", "at": [1, 2, 3] }, { "cell": "outside", "at": [0, 0, 0] } ] },
  "supports": [ { "node": "A1", "fixed": "xyz" }, { "node": "A2", "fixed": "z" }, { "node": "A2", "fixed": "y" } ],
  "loads": [ { "case": "given", "node": "A3", "force": [0, 0, -50] } ]
}`;

const faultsOf = (text: string): string[] => readTruss(text, 't.json').faults.map(sayFault);
const broken = (from: string, to: string): string[] => {
  expect(WHOLE).toContain(from);
  return faultsOf(WHOLE.replace(from, to));
};

describe('a sound file', () => {
  const { truss, faults } = readTruss(WHOLE, 't.json');
  it('has no faults', () => expect(faults).toEqual([]));
  it('gives lengths in mm and angles in rad, forces as they are', () => {
    // 1 in = 25.4 mm exactly (NIST SP 811, B.8).
    expect(truss?.nodes[3]).toEqual({ mark: 'A4', at: [0, 0, 50.8] });
    expect(truss?.members[0]).toEqual({
      mark: 'S1',
      ends: ['A1', 'A2'],
      force: -120.5,
      section: 'beech-8',
      area: 50.3,
      modulus: 13000,
      roll: Math.PI / 2,
      group: 'ring',
    });
    expect(truss?.members[1]).toMatchObject({ force: null, section: null, roll: null, group: null });
  });
  it('keeps the force of the reciprocal: N for one squared inch spread over 645.16 mm²', () => {
    expect(truss?.reciprocal?.newtonPerArea).toBeCloseTo(2 / 645.16, 15);
    expect(truss?.reciprocal?.vertices[0]?.at).toEqual([25.4, 50.8, 3 * 25.4]);
  });
  it('joins two supports of one node', () =>
    expect(truss?.supports).toEqual([
      { node: 'A1', fixed: { x: true, y: true, z: true } },
      { node: 'A2', fixed: { x: false, y: true, z: true } },
    ]));
  it('reads the same with a byte-order mark and other line ends', () => {
    expect(readTruss(`\ufeff${WHOLE.replaceAll('\n', '\r\n')}`, 't.json')).toEqual({ truss, faults: [] });
  });
});

describe('each fault has its place, its words and its mending', () => {
  it.each([
    ['"units": "in",', '', /^t\.json:1:1: units is missing: add "units": write "mm" or "cm"/],
    ['"units": "in"', '"units": "yd"', /^t\.json:5:12: units is "yd": write "mm" or/],
    ['"nodes": [ {', '"nodes": [ 5, {', /^t\.json:6:14: nodes\[0\] is 5, not an object/],
    ['"supports":', '"suports":', /^t\.json:14:3: the key "suports" is unknown: write "supports"$/],
    [
      '"roll_deg": 90',
      '"rol_deg": 90',
      /^t\.json:8:\d+: the key "rol_deg" is unknown in members\[0\]: write "roll_deg"$/,
    ],
    [
      '"at": [0, 0, 2] }',
      '"at": [0, 0, 2] }, { "id": "a1", "at": [3, 3, 3] }',
      /^t\.json:6:\d+: the mark "a1" stands on two nodes, once as "A1": /,
    ],
    [
      '["A1", "A3"] }',
      '["A1", "A33"] }',
      /^t\.json:9:34: strut "S2" names node "A33", which .*: write "A3", or add the node$/,
    ],
    ['["A1", "A3"] }', '["A1", "A1"] }', /^t\.json:9:27: strut "S2" has no length/],
    ['["A1", "A3"] }', '["A2", "A1"] }', /^t\.json:9:27: strut "S2" joins the same two nodes as strut "S1": /],
    ['["A4", "A2", "A1"]', '["A4", "A2"]', /face "P2" has fewer than three nodes/],
    ['["A4", "A2", "A1"]', '["A4", "A2", "A4"]', /face "P2" names node "A4" twice/],
    ['["A1", "A2", "A3"]', '["A1", "A9", "A3"]', /face "P1" names node "A9"/],
    ['["P1", "P2"]', '["P1", "P3"]', /cell "C1" names face "P3"/],
    ['["P1", "P2"]', '["P1", "P1"]', /cell "C1" names face "P1" twice/],
    ['"cell": "C1"', '"cell": "C2"', /the force diagram names cell "C2", .* write "C1"/],
    ['"cell": "outside"', '"cell": "C1"', /cell "C1" has two vertices/],
    ['-120.5', '1e999', /^t\.json:8:50: the number is not finite: /],
    ['-120.5', '-1e300', /^t\.json:8:50: the number is too large: /],
    ['-120.5', 'NaN', /^t\.json:8:50: the number is not finite: /],
    ['-120.5', '-Infinity', /^t\.json:8:50: the number is not finite: /],
    ['-120.5', '"12"', /^t\.json:8:50: members\[0\]\.force is "12", not a number: write a number$/],
    ['50.3', '-50.3', /area_mm2 is too small: write more than 0/],
    ['[0, 0, 2]', '[0, 0]', /nodes\[3\]\.at/],
    ['"fixed": "xyz"', '"fixed": "xq"', /supports\[0\]\.fixed is "xq": write any of x y z/],
    ['"fixed": "xyz"', '"fixed": "xx"', /names a direction twice/],
    ['"case": "given"', '"case": "__proto__"', /is no name for a case/],
    ['"units": "in",', '"units": "in", "units": "mm",', /^t\.json:5:18: the key "units" stands twice/],
    ['"panel": true', '"panel": "yes"', /faces\[0\]\.panel is "yes", not true or false/],
    ['"id": "S2"', '"id": "../S2"', /"\.\.\/S2" is not a mark/],
    ['strutwright-truss/1"', 'strutwright-truss/2"', /format is "strutwright-truss\/2": write "strutwright-truss\/1"/],
    ['"group": "roof"', '"__proto__": { "x": 1 }', /the key "__proto__" cannot be used/],
  ])('%s -> %s', (from, to, words) => {
    const said = broken(from, to);
    expect(said).toHaveLength(1);
    expect(said[0]).toMatch(words);
  });

  it('nodes that coincide, and the strut between them that has no length', () => {
    const said = broken('[1, 0, 0]', '[0, 0, 1e-12]');
    expect(said).toHaveLength(2);
    expect(said[0]).toMatch(/^t\.json:6:\d+: node "A2" is at the same place as node "A1": /);
    expect(said[1]).toMatch(/^t\.json:8:\d+: strut "S1" has no length: its two nodes are at the same place: move one/);
  });

  it('a bow tie crosses itself', () => {
    const quad = WHOLE.replace('{ "id": "A4", "at": [0, 0, 2] }', '{ "id": "A4", "at": [1, 1, 0] }');
    const said = faultsOf(quad.replace('["A1", "A2", "A3"]', '["A1", "A4", "A2", "A3"]'));
    expect(said).toEqual([expect.stringMatching(/^t\.json:11:37: face "P1" crosses itself: name its nodes in order/)]);
  });
});

it('tells every fault of a file in one run, by line', () => {
  const text = WHOLE.replace('"units": "in",', '')
    .replace('[1, 0, 0]', '[1e999, 0, 0]')
    .replace('"A3"] }', '"Z"] }')
    .replace('"panel": true', '"panel": 1')
    .replace('"cells"', '"cell"');
  const { truss, faults } = readTruss(text, 't.json');
  expect(truss).toBeNull();
  expect(faults.map((f) => f.line)).toEqual([1, 6, 9, 11, 12, 13]);
});

describe('what is not JSON at all', () => {
  it.each([
    ['', /^t\.json:1:1: .*: /],
    ['{', /an object is not closed/],
    ['[1,]', /a comma has nothing after it: remove the comma/],
    ['{"a":1 "b":2}', /^t\.json:1:8: a comma is missing/],
    ["{'a':1}", /is not JSON/],
    ['[]', /the file is a list, not an object/],
    ['null', /the file is null/],
    ['[['.repeat(100000), /nested more than 32 deep/],
    [`${'["]",'.repeat(40)}`, /nested more than 32 deep/],
    [`${'[/*]*/'.repeat(40)}`, /nested more than 32 deep/],
    [`["${'['.repeat(40)}" // ${'['.repeat(40)}\n]`, /the file is a list/],
    ['{"a":"\u0000"}', /control character/],
    ['{} x', /after the end|not JSON/],
  ])('%.12j', (text, words) => {
    const said = faultsOf(text);
    expect(said.length).toBeGreaterThan(0);
    expect(said[0]).toMatch(words);
    for (const line of said) expect(line).toMatch(/^t\.json:\d+:\d+: [^\n\r]+: [^\n\r]+$/);
  });
});

it('a fault stays one line of visible characters whatever the mark holds', () => {
  const said = broken('"id": "S2"', '"id": "a\\u202e\\nb<script>\\ud800"');
  expect(said).toHaveLength(1);
  expect(said[0]).toContain('"a\\u{202e}\\u{a}b<script>\\u{d800}"');
});

it('a large file in which no name fits is told in a moment', () => {
  const nodes = Array.from({ length: 5000 }, (_, i) => `{ "id": "N${i}", "at": [${i}, ${i % 7}, 0] }`);
  const members = Array.from({ length: 10_000 }, (_, i) => `{ "id": "S${i}", "ends": ["M${i % 5000}", "K${i}"] }`);
  const faults = faultsOf(
    `{ "format": "strutwright-truss/1", "units": "mm", "nodes": [${nodes.join(',\n')}], "members": [${members.join(',\n')}] }`,
  );
  expect(faults).toHaveLength(20_000);
  expect(faults[0]).toMatch(/names node "M0", which the file does not have: write "N0", or add the node/);
});
