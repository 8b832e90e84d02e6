import type { Material } from '../../material.js';
import { remembered, seen } from './source.js';

const FACILITY = seen('minima of a published facility guide specification, 4-159-01 table 3-1');

/** Clear sheets. `sustained` is the stress that may stand for years. */
export const SHEETS: readonly Material[] = [
  {
    name: 'acrylic-cast',
    title: 'Cast acrylic, clear',
    family: 'acrylic',
    density: 1190,
    modulus: 2760,
    poisson: 0.37,
    expansion: 7.5e-5,
    softening: 100,
    strength: { ft: 62, fm: 97, fc: 103, fv: 55, sustained: 5 },
    source: { ...FACILITY, verified: false },
    sources: {
      sustained: remembered('lower end of 5 to 10 MPa; a supplier prints 10.3 MPa for continuous load'),
      softening: remembered('glass transition'),
      poisson: remembered('acrylic'),
    },
  },
  {
    name: 'polycarbonate',
    title: 'Polycarbonate, clear',
    family: 'plastic-sheet',
    density: 1200,
    modulus: 2300,
    poisson: 0.37,
    expansion: 6.8e-5,
    softening: 140,
    strength: { ft: 60, fm: 90, fc: 70, fv: 40, sustained: 10 },
    hazards: ['laser-fire'],
    source: remembered('supplier data'),
  },
  {
    name: 'PVC-sheet',
    title: 'Rigid PVC sheet',
    family: 'plastic-sheet',
    density: 1400,
    modulus: 2900,
    poisson: 0.38,
    expansion: 7e-5,
    softening: 70,
    strength: { ft: 50, fm: 70, fc: 60, fv: 30, sustained: 5 },
    hazards: ['laser-chlorine'],
    source: remembered('supplier data'),
  },
];
