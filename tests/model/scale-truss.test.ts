import { expect, it } from 'vitest';
import { scaleTruss } from '../../src/model/scale-truss.js';
import { readTruss } from '../../src/readers/truss.js';

const { truss } = readTruss(
  `{ "format": "strutwright-truss/1", "units": "m",
     "nodes": [{ "id": "A", "at": [1, 2, 3] }, { "id": "B", "at": [0, 0, 0] }],
     "members": [{ "id": "S", "ends": ["A", "B"], "force": 10, "area_mm2": 50 }], "cells": [{ "id": "C", "faces": [] }],
     "reciprocal": { "newtonPerArea": 4, "vertices": [{ "cell": "C", "at": [1, 0, 0] }] },
     "loads": [{ "case": "given", "node": "A", "force": [0, 0, -5] }] }`,
  't.json',
);

it('scales lengths and forces apart, and a force face keeps meaning its force', () => {
  const small = scaleTruss(truss!, { scale: 0.2, forceScale: 3 });
  expect(small.nodes[0]?.at).toEqual([200, 400, 600]);
  expect(small.members[0]).toMatchObject({ force: 30, area: 50 });
  expect(small.loads[0]?.force).toEqual([0, 0, -15]);
  // A face of 1 m² is 4 N; at 1:5 the same face is 0.04 m² = 40,000 mm², and three times the force.
  expect(small.reciprocal!.newtonPerArea * 40_000).toBeCloseTo(12, 12);
  expect(small.reciprocal?.vertices[0]?.at).toEqual([200, 0, 0]);
});
