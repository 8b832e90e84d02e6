import {
  BufferGeometry,
  Float32BufferAttribute,
  Group,
  Line,
  LineBasicMaterial,
  LineSegments,
  Mesh,
  TetrahedronGeometry,
} from 'three';
import { OBJExporter } from 'three/examples/jsm/exporters/OBJExporter.js';
import { PLYExporter } from 'three/examples/jsm/exporters/PLYExporter.js';
import { describe, expect, it } from 'vitest';
import { readObj } from '../../../src/readers/geometry/obj.js';
import { readPly } from '../../../src/readers/geometry/ply.js';

// The exporter announces its end by the next frame, which a browser would draw.
Object.assign(globalThis, { requestAnimationFrame: () => 0 });

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);

describe('OBJ written by a general-purpose library (three)', () => {
  const points = new BufferGeometry();
  points.setAttribute('position', new Float32BufferAttribute([0, 0, 0, 1, 0, 0, 1, 2, 0, 0, 2, 0.5], 3));
  const run = new Line(points, new LineBasicMaterial());
  run.name = 'run';
  const pairs = new LineSegments(points, new LineBasicMaterial());
  pairs.name = 'pairs';
  const mesh = new Mesh(new TetrahedronGeometry(1));
  mesh.name = 'skin';
  const { geometry, faults } = readObj(new OBJExporter().parse(new Group().add(run, pairs, mesh)), 'a.obj');
  it('has its lines, its faces and its groups', () => {
    expect(faults).toEqual([]);
    expect(geometry!.lines.map((l) => [l.layer, ...l.ends])).toEqual([
      ['run', [0, 0, 0], [1, 0, 0]],
      ['run', [1, 0, 0], [1, 2, 0]],
      ['run', [1, 2, 0], [0, 2, 0.5]],
      ['pairs', [0, 0, 0], [1, 0, 0]],
      ['pairs', [1, 2, 0], [0, 2, 0.5]],
    ]);
    expect(geometry!.loops).toHaveLength(4);
    // A regular tetrahedron in the unit sphere: each corner at distance 1.
    for (const { points: loop, layer } of geometry!.loops) {
      expect(layer).toBe('skin');
      for (const p of loop) expect(Math.hypot(...p)).toBeCloseTo(1, 6);
    }
    expect(geometry).toMatchObject({ unit: null, up: null });
  });
});

describe('OBJ by its manual', () => {
  it('takes negative indices, joined lines, slashes, comments, and counts what it leaves out', () => {
    const text =
      'v 0 0 0\nv 1 0 0 # two\nv 1 1 0\nv 0 1 0\nvn 0 0 1\ng a b\nf 1/1/1 2//1 \\\n -2/3 -1\ncurv 0 1\nl -1 1\n';
    const { geometry } = readObj(text, 'a.obj');
    expect(geometry!.loops).toEqual([
      {
        points: [
          [0, 0, 0],
          [1, 0, 0],
          [1, 1, 0],
          [0, 1, 0],
        ],
        layer: 'a b',
      },
    ]);
    expect(geometry!.lines[0]!.ends).toEqual([
      [0, 1, 0],
      [0, 0, 0],
    ]);
    expect(Object.fromEntries(geometry!.leftOut)).toEqual({ curv: 1 });
  });
  it.each([
    ['v 1 2\n', 'a vertex is not three finite numbers'],
    ['v 1 2 1e999\n', 'a vertex is not three finite numbers'],
    ['v 0 0 0\nl 1 2\n', 'names vertex "2", which does not stand above'],
    ['v 0 0 0\nl 1 0\n', 'names vertex "0", which does not stand above'],
    ['v 0 0 0\nf 1 1\n', 'has fewer than 3 vertices'],
    ['{ "a": 1 }\n', '"{" is no statement of an OBJ file'],
  ])('%j', (text, what) => {
    const { geometry, faults } = readObj(text, 'a.obj');
    expect(geometry).toBeNull();
    expect(faults.at(-1)?.what).toBe(what);
  });
});

describe('PLY written by a general-purpose library (three)', () => {
  const mesh = new Mesh(new TetrahedronGeometry(2));
  const options = { excludeAttributes: ['normal', 'uv'] };
  it.each([
    ['ASCII', () => bytes(new PLYExporter().parse(mesh, () => {}, options) as unknown as string)],
    [
      'binary',
      () =>
        new Uint8Array(new PLYExporter().parse(mesh, () => {}, { ...options, binary: true }) as unknown as ArrayBuffer),
    ],
    [
      'little-endian',
      () =>
        new Uint8Array(
          new PLYExporter().parse(mesh, () => {}, {
            ...options,
            binary: true,
            littleEndian: true,
          }) as unknown as ArrayBuffer,
        ),
    ],
  ])('%s', (_, make) => {
    const { geometry, faults } = readPly(make(), 'a.ply');
    expect(faults).toEqual([]);
    expect(geometry!.loops).toHaveLength(4);
    for (const { points: loop } of geometry!.loops) for (const p of loop) expect(Math.hypot(...p)).toBeCloseTo(2, 6);
  });
});

describe('PLY by its description', () => {
  // Turk's own example has edges with colours; this one is cut down.
  const TEXT =
    'ply\nformat ascii 1.0\ncomment made by hand\nelement vertex 3\nproperty float x\nproperty float y\nproperty float z\n' +
    'element face 1\nproperty list uchar int vertex_index\nelement edge 2\nproperty int vertex1\nproperty int vertex2\nproperty uchar red\n' +
    'element note 1\nproperty int n\nend_header\n0 0 0\n1 0 0\n0 1 0\n3 0 1 2\n0 1 255\n1 2 0\n7\n';
  it('has edges, faces, and counts other elements', () => {
    const { geometry } = readPly(bytes(TEXT), 'a.ply');
    expect(geometry!.lines.map((l) => l.ends)).toEqual([
      [
        [0, 0, 0],
        [1, 0, 0],
      ],
      [
        [1, 0, 0],
        [0, 1, 0],
      ],
    ]);
    expect(geometry!.loops).toHaveLength(1);
    expect(Object.fromEntries(geometry!.leftOut)).toEqual({ note: 1 });
  });
  it.each([
    ['', 'is not a PLY file'],
    [TEXT.replace('3 0 1 2', '3 0 1 9'), 'face 0 names vertex "9", which is not there'],
    [TEXT.replace('3 0 1 2', '2 0 1'), 'face 0 has fewer than 3 vertices'],
    [TEXT.replace('1 0 0', '1 x 0'), 'vertex 1 has no finite x, y and z'],
    [TEXT.replace('\n7\n', '\n'), 'ends before its last element'],
    [TEXT.replace('element vertex 3', 'element vertex 999999999'), 'has 999999999 of "vertex"'],
    [TEXT.replace('float x', 'complex x'), '"property complex x" is not understood'],
  ])('a fault %#', (text, what) => {
    const { geometry, faults } = readPly(bytes(text), 'a.ply');
    expect(geometry).toBeNull();
    expect(faults[0]!.what).toBe(what);
  });
});
