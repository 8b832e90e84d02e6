import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { strFromU8, strToU8, unzipSync, zipSync } from 'fflate';
import { PNG } from 'pngjs';
import { expect, it } from 'vitest';
import { packObject, writeThreeMf } from '../../../src/documents/formats/three-mf.js';
import { bedFile } from '../../../src/documents/nodes/bed-file.js';
import { bedPicture } from '../../../src/documents/nodes/bed-picture.js';
import { pieceIcon, planImage } from '../../../src/documents/nodes/piece-pictures.js';
import { deflateBlocks } from '../../../src/machine/deflate.js';
import type { PlannedBed } from '../../../src/model/plan.js';

// A tetrahedron with legs of 3, 4 and 5 mm.
const positions = Float32Array.from([0, 0, 0, 3, 0, 0, 0, 4, 0, 0, 0, 5]);
const triangles = Uint32Array.from([0, 2, 1, 0, 1, 3, 1, 2, 3, 2, 0, 3]);
const a = packObject(positions, triangles, 1, 'N1', 'N1/A', deflateBlocks);
const b = packObject(positions, triangles, 2, 'N2 <&">', 'N2/A', deflateBlocks);

const ITEM: PlannedBed['items'][number] = {
  mark: 'N1',
  piece: '',
  x: 10,
  y: 20,
  turned: false,
  box: [3, 4, 5],
  volume: 10,
  mass: 0.001,
  outline: [],
};
const BED: PlannedBed = {
  mark: 'bed-01',
  printer: 'invented',
  shape: 'rectangle',
  width: 60,
  depth: 40,
  items: [],
  volume: 10,
  mass: 0.001,
  layers: 25,
  time: 100,
  flow: 8,
  layerChange: 4,
  layer: 0.2,
};

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

const READ = join(import.meta.dirname, '../../tools/read-3mf.py');
const SCHEMA = join(import.meta.dirname, 'three-mf-core.xsd');

/** What the reference implementation and the schema say of a file. */
function readByOthers(bytes: Uint8Array) {
  const folder = mkdtempSync(join(tmpdir(), '3mf-'));
  try {
    const path = join(folder, 'a.3mf');
    writeFileSync(path, bytes);
    return JSON.parse(execFileSync('/usr/bin/python3', [READ, path, SCHEMA], { encoding: 'utf8', timeout: 60_000 }));
  } finally {
    rmSync(folder, { recursive: true });
  }
}

it('is read by the reference implementation in its strict mode, with a picture of the bed and of each object', () => {
  const icon = pieceIcon(positions, triangles, deflateBlocks);
  const object = packObject(positions, triangles, 7, 'N1', 'N1/A', deflateBlocks, icon);
  const bed: PlannedBed = { ...BED, items: [{ ...ITEM, mark: 'N1' }] };
  const picture = bedPicture(bed, () => planImage(positions, triangles), deflateBlocks);
  const bytes = bedFile(bed, () => ({ object, depth: 4 }), 'Test', '2026-12-01', deflateBlocks, picture);
  expect(readByOthers(bytes)).toEqual({
    warnings: 0,
    thumbnail: true,
    objects: [
      {
        name: 'N1',
        part: 'N1/A',
        picture: '/3D/Thumbnails/object-7.png',
        vertices: 4,
        triangles: 4,
        closed: true,
      },
    ],
    items: ['N1/A'],
    schema: [],
  });
  const parts = unzipSync(bytes);
  const shown = PNG.sync.read(Buffer.from(parts['Metadata/thumbnail.png']!));
  expect([shown.width, shown.height]).toEqual([2 * 60 + 12, 2 * 40 + 12]);
  // Plastic where the piece lies, its right angle at 10, 20 mm from the bed's corner; bare bed beside it.
  const at = (x: number, y: number): number[] => {
    const i = 4 * ((shown.height - 1 - 6 - Math.floor(2 * y)) * shown.width + 6 + Math.floor(2 * x));
    return [...shown.data.subarray(i, i + 3)];
  };
  expect(at(10.6, 20.6)[2]!).toBeLessThan(at(10.6, 20.6)[0]!);
  expect(at(9, 20.6)).toEqual([238, 238, 238]);
  expect(at(12.8, 23.8)).toEqual([238, 238, 238]);
  const one = PNG.sync.read(Buffer.from(parts['3D/Thumbnails/object-7.png']!));
  expect([one.width, one.height]).toEqual([128, 128]);
});

it('is found out by schema and reference where it breaks the specification', () => {
  const good = unzipSync(writeThreeMf([{ object: a, turned: false, move: [0, 0] }], 'T', null, null, deflateBlocks));
  const broken = (from: string, to: string) =>
    readByOthers(
      zipSync({
        ...good,
        '3D/3dmodel.model': strToU8(strFromU8(good['3D/3dmodel.model']!).replace(from, to)),
      }),
    );
  expect(broken('<resources>', '<resources>')).toMatchObject({ warnings: 0, schema: [] });
  const furlong = broken('unit="millimeter"', 'unit="furlong"');
  expect(furlong.refused).toMatch(/readfromfile/);
  expect(furlong.schema.length).toBeGreaterThan(0);
  // A triangle taken out is the mesh's business: no schema sees it.
  const open = broken('<triangle v1="2" v2="0" v3="3"/>', '');
  expect(open.objects[0].closed).toBe(false);
  expect(open.schema).toEqual([]);
  expect(broken('partnumber="N1/A"/>', 'colour="red"/>').schema.join()).toMatch(/colour/);
  // An item of an object that is not there.
  expect(broken('objectid="1"', 'objectid="5"').schema.length).toBeGreaterThan(0);
});

it('turns a piece about its own corner so that its box stands where the plan put it', () => {
  const bed: PlannedBed = { ...BED, items: [{ ...ITEM, mark: 'N1', turned: true }] };
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
