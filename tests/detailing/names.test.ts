import { expect, it } from 'vitest';
import { nameFindings } from '../../src/detailing/names.js';
import { sayFinding } from '../../src/model/findings/index.js';
import { jobSchema } from '../../src/model/job/index.js';
import { readTruss } from '../../src/readers/truss.js';

const { truss } = readTruss(
  `{ "format": "strutwright-truss/1", "units": "mm", "nodes": [ { "id": "N1", "at": [0, 0, 0] }, { "id": "N2", "at": [1, 0, 0] } ],
     "members": [ { "id": "S1", "ends": ["N1", "N2"], "group": "ring" } ] }`,
  't.json',
);
const job = (more: object) => jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', ...more });

it('names that the truss has are no finding', () => {
  expect(
    nameFindings(
      truss!,
      job({ nodes: { systems: { N1: 'foot' } }, struts: { groups: { ring: 'beech-6' }, ends: { 'S1@N2': 'slide' } } }),
    ),
  ).toEqual([]);
});

it('names that it does not have are warnings with the nearest one', () => {
  const found = nameFindings(
    truss!,
    job({
      nodes: { systems: { n1: 'foot' } },
      struts: { groups: { rung: 'beech-6' }, ends: { 'S9@N7': 'slide' } },
      loads: { cases: [{ name: 'a', kind: 'snow', nodes: [{ node: 'N3', force_N: [0, 0, -1] }], groups: ['roof'] }] },
    }),
  );
  expect(found.map((f) => [f.level, f.kind, f.subject])).toEqual([
    ['warn', 'node', 'n1'],
    ['warn', 'strut', 'rung'],
    ['warn', 'strut', 'S9'],
    ['warn', 'node', 'N7'],
    ['warn', 'node', 'N3'],
    ['warn', 'face', 'roof'],
  ]);
  expect(sayFinding(found[1]!)).toBe(
    'rung: struts.groups of the job names this group of struts, which the truss does not have; write ring, or remove the entry',
  );
});
