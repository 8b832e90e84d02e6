import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { strFromU8, unzipSync } from 'fflate';
import { expect, it } from 'vitest';
import { packObject, writeThreeMf } from '../../../src/documents/formats/three-mf.js';
import { bedFile } from '../../../src/documents/nodes/bed-file.js';
import { deflateBlocks } from '../../../src/machine/deflate.js';
import type { PlannedBed } from '../../../src/model/plan.js';

// A tetrahedron with legs of 3, 4 and 5 mm.
const positions = Float32Array.from([0, 0, 0, 3, 0, 0, 0, 4, 0, 0, 0, 5]);
const triangles = Uint32Array.from([0, 2, 1, 0, 1, 3, 1, 2, 3, 2, 0, 3]);
const a = packObject(positions, triangles, 1, 'N1', 'N1/A', deflateBlocks);
const b = packObject(positions, triangles, 2, 'N2 <&">', 'N2/A', deflateBlocks);

it('is an archive of the parts that the core specification asks for, which an outside unpacker reads without a fault', () => {
  const bytes = writeThreeMf(
    [
      { object: a, turned: false, move: [2, 2] },
      { object: b, turned: true, move: [20, 2] },
    ],
    'Test',
    '2026-12-01',
    null,
    deflateBlocks,
  );
  const parts = unzipSync(bytes);
  // 3MF core specification 1.3, 2: content types, a relationship of the package to the model part, the model part.
  expect(Object.keys(parts)).toEqual(['[Content_Types].xml', '_rels/.rels', '3D/3dmodel.model']);
  expect(strFromU8(parts['_rels/.rels']!)).toContain('Target="/3D/3dmodel.model"');
  const folder = mkdtempSync(join(tmpdir(), '3mf-'));
  try {
    const path = join(folder, 'a.3mf');
    writeFileSync(path, bytes);
    // Tests every CRC, of the joined blocks too.
    const said = execFileSync('python3', ['-c', CHECK, path], { encoding: 'utf8' });
    expect(JSON.parse(said)).toEqual({
      bad: null,
      order: ['metadata', 'metadata', 'metadata', 'resources', 'build'],
      unit: 'millimeter',
      names: ['N1', 'N2 <&">'],
      parts: ['N1/A', 'N2/A'],
      vertices: [4, 4],
      triangles: [4, 4],
      items: [
        ['1', '1 0 0 0 1 0 0 0 1 2 2 0'],
        ['2', '0 1 0 -1 0 0 0 0 1 20 2 0'],
      ],
    });
  } finally {
    rmSync(folder, { recursive: true });
  }
});

const CHECK = `
import json, sys, zipfile
import xml.etree.ElementTree as E
z = zipfile.ZipFile(sys.argv[1])
bad = z.testzip()
N = '{http://schemas.microsoft.com/3dmanufacturing/core/2015/02}'
m = E.fromstring(z.read('3D/3dmodel.model'))
o = m.findall(N + 'resources/' + N + 'object')
print(json.dumps({
  'bad': bad, 'order': [c.tag.replace(N, '') for c in m], 'unit': m.get('unit'),
  'names': [x.get('name') for x in o], 'parts': [x.get('partnumber') for x in o],
  'vertices': [len(x.findall(N + 'mesh/' + N + 'vertices/' + N + 'vertex')) for x in o],
  'triangles': [len(x.findall(N + 'mesh/' + N + 'triangles/' + N + 'triangle')) for x in o],
  'items': [[i.get('objectid'), i.get('transform')] for i in m.findall(N + 'build/' + N + 'item')],
}))
`;

it('turns a piece about its own corner so that its box stands where the plan put it', () => {
  const bed = {
    mark: 'bed-01',
    items: [{ mark: 'N1', piece: '', x: 10, y: 20, turned: true }],
  } as unknown as PlannedBed;
  const text = strFromU8(
    unzipSync(bedFile(bed, () => ({ object: a, depth: 4 }), 'T', null, deflateBlocks))['3D/3dmodel.model']!,
  );
  const [xx, xy, , yx, yy, , , , , mx, my] = /transform="([^"]+)"/.exec(text)![1]!.split(' ').map(Number) as number[];
  const moved = [0, 1, 2, 3].map((i) => {
    const [x, y] = [positions[3 * i]!, positions[3 * i + 1]!];
    return [x * xx! + y * yx! + mx!, x * xy! + y * yy! + my!];
  });
  expect(Math.min(...moved.map((p) => p[0]!))).toBeCloseTo(10, 9);
  expect(Math.min(...moved.map((p) => p[1]!))).toBeCloseTo(20, 9);
  expect(Math.max(...moved.map((p) => p[0]!))).toBeCloseTo(14, 9);
  expect(Math.max(...moved.map((p) => p[1]!))).toBeCloseTo(23, 9);
});

it('says the same date in the archive whatever the time zone', () => {
  const one = writeThreeMf([{ object: a, turned: false, move: [0, 0] }], 'T', null, null, deflateBlocks);
  const before = process.env['TZ'];
  process.env['TZ'] = 'Pacific/Auckland';
  const two = writeThreeMf([{ object: a, turned: false, move: [0, 0] }], 'T', null, null, deflateBlocks);
  process.env['TZ'] = before;
  expect(Buffer.from(one).equals(Buffer.from(two))).toBe(true);
});
