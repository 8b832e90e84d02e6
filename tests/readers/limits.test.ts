import { expect, it } from 'vitest';
import { LIMITS } from '../../src/model/limits.js';
import type { Fault } from '../../src/readers/fault.js';
import { readCsv, readPairForces } from '../../src/readers/geometry/csv.js';
import { readDxf } from '../../src/readers/geometry/dxf.js';
import { readObj } from '../../src/readers/geometry/obj.js';
import { readJob } from '../../src/readers/job.js';
import { readMeasured } from '../../src/readers/measured.js';
import { readDxfOutlines } from '../../src/readers/outlines/outlines-dxf.js';
import { readJsonOutlines } from '../../src/readers/outlines/outlines-json.js';
import { readSvgOutlines } from '../../src/readers/outlines/outlines-svg.js';
import { readPieces } from '../../src/readers/pieces.js';
import { readTruss } from '../../src/readers/truss.js';

const none = { struts: new Set<string>(), nodes: new Set<string>() };
const READERS: Readonly<Record<string, (text: string) => { readonly faults: readonly Fault[] }>> = {
  truss: (text) => readTruss(text, 'f'),
  job: (text) => readJob(text, 'f'),
  OBJ: (text) => readObj(text, 'f'),
  DXF: (text) => readDxf(text, 'f'),
  CSV: (text) => readCsv(text, 'f', null),
  forces: (text) => readPairForces(text, 'f'),
  measurements: (text) => readMeasured(text, 'f', none),
  pieces: (text) => readPieces(text, 'f'),
  'outlines in DXF': (text) => readDxfOutlines(text, 'f'),
  'outlines in SVG': (text) => readSvgOutlines(text, 'f'),
  'outlines in JSON': (text) => readJsonOutlines(text, 'f'),
};

it('a file past the limit of characters is refused before it is read, whatever its kind', () => {
  const text = ' '.repeat(LIMITS.fileCharacters + 1);
  for (const [kind, read] of Object.entries(READERS))
    expect(
      read(text).faults.map((f) => f.what),
      kind,
    ).toEqual([`is larger than ${LIMITS.fileCharacters} characters`]);
});

const list = (count: number, row: (i: number) => string): string =>
  Array.from({ length: count }, (_, i) => row(i)).join();
const trussOf = (nodes: number, members: number, corners = 0): string =>
  `{ "format": "strutwright-truss/1", "units": "m", "nodes": [${list(nodes, (i) => `{"id":"N${i}","at":[${i},${(i * 7) % 11},${(i * 3) % 5}]}`)}],
  "members": [${list(members, (i) => `{"id":"S${i}","ends":["N${i % (nodes - 1)}","N${(i % (nodes - 1)) + 1 + Math.floor(i / (nodes - 1))}"]}`)}]
  ${corners ? `, "faces": [{"id":"P","nodes":[${list(corners, (i) => `"N${i}"`)}]}]` : ''} }`;

it.each([
  ['nodes', trussOf(LIMITS.nodes + 1, 1), LIMITS.nodes],
  ['corners of a face', trussOf(LIMITS.corners + 1, 1, LIMITS.corners + 1), LIMITS.corners],
])('too many %s are one fault that says how many there may be', (_, text, most) => {
  const { truss, faults } = readTruss(text, 'f');
  expect(truss).toBeNull();
  expect(faults).toHaveLength(1);
  expect(`${faults[0]!.what} ${faults[0]!.mend}`).toContain(String(most));
});
