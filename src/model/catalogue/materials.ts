import type { Material } from '../material.js';

/** Half of a clear-wood mean stands for a 5 % fractile with defects: from memory, a judgement. */
const BEECH_DOWEL: Material = {
  name: 'beech-dowel',
  title: 'Beech dowel, ungraded',
  family: 'timber',
  density: 710,
  modulus: 13000,
  expansion: 5e-6,
  strength: { fm: 55, fc: 27, ft: 55, fv: 6 },
  source: {
    text: 'half the clear-wood means of European beech (from memory)',
    mark: 'memory',
    verified: false,
  },
};

const PETG_PRINT: Material = {
  name: 'PETG-print',
  title: 'PETG, printed from filament',
  family: 'plastic-print',
  density: 1270,
  modulus: 2000,
  softening: 71,
  strength: { ft: 47, ftZ: 23.5, fc: 47, fv: 25 },
  source: {
    text: 'short-term tests in print, in the literature; across layers half',
    mark: 'seen',
    verified: false,
  },
};

const ACRYLIC: Material = {
  name: 'acrylic-cast',
  title: 'Cast acrylic, clear',
  family: 'acrylic',
  density: 1190,
  modulus: 2855,
  expansion: 7.5e-5,
  softening: 100,
  strength: { ft: 62, fm: 97, sustained: 5 },
  source: {
    text: 'minima of a published facility guide specification',
    mark: 'seen',
    verified: false,
  },
};

/** Materials by name. A job adds its own under `materials`. */
export const MATERIALS: ReadonlyMap<string, Material> = new Map(
  [BEECH_DOWEL, PETG_PRINT, ACRYLIC].map((m) => [m.name, m]),
);
