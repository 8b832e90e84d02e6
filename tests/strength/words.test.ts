import { expect, it } from 'vitest';
import { sayFinding } from '../../src/model/findings/index.js';
import { STRENGTH_FINDINGS } from '../../src/model/findings/strength.js';
import { jobSchema } from '../../src/model/job/index.js';
import { assess } from '../../src/pipeline/assess.js';
import { trussOf } from '../helpers/truss.js';

/** Invented: a square of 500 mm with a panel, forces of both signs. */
const truss = trussOf({
  nodes: [
    [0, 0, 0],
    [500, 0, 0],
    [500, 500, 0],
    [0, 500, 0],
  ],
  edges: [
    [0, 1],
    [1, 2],
    [2, 3],
    [3, 0],
  ],
  faces: [[0, 1, 2, 3]],
  panels: true,
  forces: [900, -900, 900, -900],
});

const JOBS: readonly object[] = [
  {},
  { use: 'outdoor' },
  { use: 'overhead', panels: { holdBy: 'none' } },
  { use: 'overhead', nodes: { joint: 'seated' } },
  { nodes: { joint: 'loose' } },
  { nodes: { depth_mm: 10 } },
  { nodes: { joint: 'pinned', bondStrength_MPa: 5 } },
  { strength: { standard: 'EN 1993-1-1' } },
  { strength: { standard: 'NDS' }, struts: { section: 'DFL-2x2' } },
  { strength: { standard: 'NDS' }, struts: { section: 'thin' }, sections: { thin: section('DFL-No1', 9) } },
  { struts: { section: 'x' }, sections: { x: section('nothing', 10) } },
  { use: 'outdoor', materials: { soft: { like: 'PLA-print', softening_C: 50 } }, nodes: { material: 'soft' } },
  { use: 'outdoor', panels: { material: 'birch-plywood' } },
  { panels: { holdBy: 'channel', thickness_mm: 0.5, bite_mm: 6 } },
  { use: 'overhead', panels: { fixingCapacity_N: 0.01 } },
  { panels: { seating: 'over' }, loads: { cases: [{ name: 'sand', kind: 'permanent', pressure_kN_per_m2: 30 }] } },
];

function section(material: string, diameter: number): object {
  return { material, shape: { kind: 'round', diameter_mm: diameter } };
}

it('every finding of strength that these jobs meet is a whole sentence', () => {
  const met = new Set<string>();
  for (const more of JOBS) {
    const job = jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', ...more });
    for (const f of assess(truss, job).findings) {
      if (!(f.code in STRENGTH_FINDINGS)) continue;
      met.add(f.code);
      const said = sayFinding(f);
      expect(said, f.code).not.toMatch(/undefined|unknown|NaN|null/);
    }
  }
  // Plastics of the catalogue all have a softening point; a job's own one without it is rare, and its sentence is plain.
  const unmet = Object.keys(STRENGTH_FINDINGS).filter((code) => !met.has(code) && code !== 'softening-unknown');
  expect(unmet).toEqual([]);
});
