import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { writeTrussJson } from '../../src/documents/truss/truss-json.js';
import type { RawGeometry } from '../../src/model/raw-geometry.js';
import { convertGeometry } from '../../src/readers/convert/convert.js';
import { readMarkMemory, writeMarkMemory } from '../../src/readers/convert/mark-memory.js';
import { readCsv, readPairForces } from '../../src/readers/geometry/csv.js';
import { readDxf } from '../../src/readers/geometry/dxf.js';
import { readObj } from '../../src/readers/geometry/obj.js';
import { readPly } from '../../src/readers/geometry/ply.js';
import { readJob } from '../../src/readers/job.js';
import { readTruss } from '../../src/readers/truss.js';
import { holds, mustBeFaults, options } from './holds.js';
import { mutated } from './mutate.js';

const file = (path: string): string => readFileSync(new URL(path, import.meta.url), 'utf8');
const TRUSS = file('../../templates/table-model/truss.json').slice(0, 6000);
const SMALL = `{ "format": "strutwright-truss/1", "units": "m",
  "nodes": [ { "id": "A", "at": [0, 0, 0] }, { "id": "B", "at": [1, 0, 0] }, { "id": "C", "at": [0, 1, 0] }, { "id": "D", "at": [0.3, 0.3, 1] } ],
  "members": [ { "id": "S1", "ends": ["A", "B"], "force": -3, "group": "g", "roll_deg": 10 }, { "id": "S2", "ends": ["B", "C"] }, { "id": "S3", "ends": ["C", "A"] }, { "id": "S4", "ends": ["A", "D"] } ],
  "faces": [ { "id": "P1", "nodes": ["A", "B", "C"], "panel": true } ], "cells": [ { "id": "C1", "faces": ["P1"] } ],
  "reciprocal": { "newtonPerArea": 1, "vertices": [ { "cell": "C1", "at": [0, 0, 1] } ] },
  "supports": [ { "node": "A", "fixed": "xyz" } ], "loads": [ { "case": "snow", "node": "B", "force": [0, 0, -1] } ] }`;
const JOB = `{ "format": "strutwright-job/1", "title": "T", "truss": "t.json", "date": "2026-12-01", "scale": 0.5,
  "sections": { "my": { "shape": { "kind": "tube", "diameter_mm": 10, "wall_mm": 1 }, "material": "beech-dowel" } },
  "loads": { "cases": [ { "name": "snow", "kind": "snow", "pressure_kN_per_m2": 1 } ] }, "printers": [ { "name": "p", "width_mm": 200 } ],
  "forces": { "source": "given", "sign": -1 }, "waivers": [ { "code": "c", "subject": "S", "reason": "r", "by": "b" } ] }`;
const OBJ =
  '# a\no box\nv 0 0 0\nv 1 0 0\nv 1 1 0\nv 0 1 0\nv 0.5 0.5 1\ng legs\nl 1 2 3 4 1\nl 1 5\nl 2 5\nf 1/1/1 2//2 5\nf -1 -2 -3\n';
const PLY =
  'ply\nformat ascii 1.0\nelement vertex 4\nproperty float x\nproperty float y\nproperty float z\nelement face 1\nproperty list uchar int vertex_index\nelement edge 2\nproperty int vertex1\nproperty int vertex2\nend_header\n0 0 0\n1 0 0\n0 1 0\n0 0 1\n3 0 1 2\n0 3\n1 3\n';
const DXF = file('../readers/geometry/fixtures/tower.dxf');
const NODES = 'Node;X [m];Y [m];Z [m]\nA;0;0;0\nB;1,5;0;0\nC;0;2;0,1\n';
const STRUTS = 'Name,From,To,Force (kN),Group\nS1,A,B,-1.25,ring\nS2,B,C,,\n"S3",C,A,3,"x"\n';

/** What was read can be converted, and what that writes is a sound file or has faults in words. */
function convertible(geometry: RawGeometry | null): void {
  if (!geometry) return;
  const { truss, memory } = convertGeometry(geometry, {
    unit: 'm',
    up: 'z',
    merge: null,
    split: true,
    findFaces: true,
    panels: true,
    forces: [],
    memory: null,
  });
  mustBeFaults(readTruss(writeTrussJson(truss), 'f').faults);
  expect(readMarkMemory(writeMarkMemory(memory), 'f').faults).toEqual([]);
}

describe('a file that was damaged anywhere is read, or refused in words', () => {
  it.each([
    ['a whole truss', TRUSS],
    ['a truss with every key', SMALL],
  ])('%s', (_, source) =>
    holds(source, (text) => {
      const { truss, faults } = readTruss(text, 'f');
      if (truss) {
        expect(truss.nodes.every((n) => n.at.every(Number.isFinite))).toBe(true);
        // What was accepted is written and read back the same.
        expect(readTruss(writeTrussJson(truss), 'f').faults).toEqual([]);
      }
      return { value: truss, faults };
    }),
  );
  it('a job', () =>
    holds(JOB, (text) => {
      const { job, faults } = readJob(text, 'f');
      return { value: job, faults };
    }));
  it('an OBJ file', () =>
    holds(OBJ, (text) => {
      const { geometry, faults } = readObj(text, 'f');
      convertible(geometry);
      return { value: geometry, faults };
    }));
  it('a DXF file', () =>
    holds(DXF.slice(DXF.indexOf('ENTITIES') - 20), (text) => {
      const { geometry, faults } = readDxf(text, 'f');
      return { value: geometry, faults };
    }));
  it('a DXF file with blocks', () => {
    const text = file('../readers/geometry/fixtures/blocks.dxf');
    holds(text.slice(text.lastIndexOf('SECTION', text.indexOf('\nBLOCKS')) - 3), (damaged) => {
      const { geometry, faults } = readDxf(damaged, 'f');
      return { value: geometry, faults };
    });
  });
  it('a PLY file', () =>
    holds(PLY, (text) => {
      const { geometry, faults } = readPly(new TextEncoder().encode(text), 'f');
      convertible(geometry);
      return { value: geometry, faults };
    }));
  it('a binary PLY file', () => {
    const head = PLY.slice(0, PLY.indexOf('end_header') + 11).replace('ascii', 'binary_little_endian');
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 120 }), mutated(head), (tail, text) => {
        const bytes = new Uint8Array([...new TextEncoder().encode(text), ...tail]);
        const { geometry, faults } = readPly(bytes, 'f');
        expect(geometry === null).toBe(faults.length > 0);
        mustBeFaults(faults);
      }),
      options,
    );
  });
  it('tables of nodes, of struts and of forces', () => {
    holds(NODES, (text) => {
      const { geometry, faults } = readCsv(text, 'f', { text: STRUTS, name: 'f' });
      return { value: geometry, faults };
    });
    holds(STRUTS, (text) => {
      const { geometry, faults } = readCsv(NODES, 'f', { text, name: 'f' });
      convertible(geometry);
      return { value: geometry, faults };
    });
    holds(STRUTS, (text) => {
      const { forces, faults } = readPairForces(text, 'f');
      expect(faults.length > 0 || forces.every((f) => Number.isFinite(f.force))).toBe(true);
      return { value: faults.length > 0 ? null : forces, faults };
    });
  });
  it('a memory of marks', () =>
    holds(
      writeMarkMemory({
        format: 'strutwright-marks/1',
        nodes: { N001: { at: [0, 0, 0] }, N002: { at: [1, 0, 0] } },
        struts: { S001: { at: [0.5, 0, 0], nodes: ['N001', 'N002'] } },
        faces: {},
        withdrawn: ['N003'],
      }),
      (text) => {
        const { memory, faults } = readMarkMemory(text, 'f');
        return { value: memory, faults };
      },
    ));
  it('nothing but noise', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 200 }), (text) => {
        for (const { faults } of [
          readTruss(text, 'f'),
          readJob(text, 'f'),
          readObj(text, 'f'),
          readDxf(text, 'f'),
          readCsv(text, 'f', null),
        ])
          mustBeFaults(faults);
      }),
      options,
    );
  });
});
