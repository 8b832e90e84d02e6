import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { writeStl } from '../../../src/documents/formats/stl.js';
import { inspect, readStl } from '../../tools/mesh-check.mjs';

// A tetrahedron with legs of 3, 4 and 5 mm: volume 3 x 4 x 5 / 6 = 10 mm³.
const positions = Float32Array.from([0, 0, 0, 3, 0, 0, 0, 4, 0, 0, 0, 5]);
const triangles = Uint32Array.from([0, 2, 1, 0, 1, 3, 1, 2, 3, 2, 0, 3]);

it('writes header, count, true unit normals and corners', () => {
  const bytes = writeStl(positions, triangles, 'solid N1');
  expect(bytes.length).toBe(84 + 4 * 50);
  // A text file starts with "solid": a binary one must not.
  expect(Buffer.from(bytes.subarray(0, 5)).toString('latin1')).not.toBe('solid');
  const stl = readStl(bytes);
  const seen = inspect(stl);
  expect(seen).toMatchObject({ open: 0, degenerate: 0, shells: 1 });
  expect(seen.volume).toBeCloseTo(10, 12);
  expect([...stl.normals.subarray(0, 6)].map((v) => v + 0)).toEqual([0, 0, -1, 0, -1, 0]);
  for (let t = 0; t < 4; t++) expect(Math.hypot(...stl.normals.subarray(3 * t, 3 * t + 3))).toBeCloseTo(1, 6);
});

it('the checker used in these tests sees an open edge, a flipped face and two shells', () => {
  const open = inspect(readStl(writeStl(positions, triangles.subarray(0, 9), '')));
  expect(open.open).toBe(3);
  const flipped = Uint32Array.from(triangles);
  flipped.set([0, 1, 2], 0);
  expect(inspect(readStl(writeStl(positions, flipped, ''))).open).toBeGreaterThan(0);
  const two = Float32Array.from([...positions, ...positions.map((v) => v + 10)]);
  const both = Uint32Array.from([...triangles, ...triangles.map((i) => i + 4)]);
  expect(inspect(readStl(writeStl(two, both, ''))).shells).toBe(2);
});

it('is read by admesh as a closed solid of the same volume', () => {
  const folder = mkdtempSync(join(tmpdir(), 'stl-'));
  try {
    const path = join(folder, 'a.stl');
    writeFileSync(path, writeStl(positions, triangles, 'tetrahedron'));
    const said = execFileSync('timeout', ['20', 'admesh', path], { encoding: 'utf8' });
    expect(said).toMatch(/Total disconnected facets\s*:\s*0\s+0/);
    expect(said).toMatch(/Number of parts\s*:\s*1\s+Volume\s*:\s*10\.0/);
  } finally {
    rmSync(folder, { recursive: true });
  }
});
