import type { Material } from '../../material.js';
import { remembered } from './source.js';

/** Wood-based boards; of a pair along / across the face grain the lower value, since a panel may be nested either way round. */
export const BOARDS: readonly Material[] = [
  {
    name: 'birch-plywood',
    title: 'Birch plywood',
    family: 'board',
    density: 680,
    densityK: 630,
    modulus: 7500,
    poisson: 0.2,
    expansion: 5e-6,
    strength: { fm: 33, ft: 30, fc: 22, fv: 9.5 },
    source: remembered('handbook of Finnish plywood, 12 to 18 mm'),
  },
  {
    name: 'softwood-plywood',
    title: 'Softwood plywood',
    family: 'board',
    density: 460,
    densityK: 400,
    modulus: 4000,
    poisson: 0.2,
    expansion: 5e-6,
    strength: { fm: 10, ft: 7, fc: 10, fv: 3.5 },
    source: remembered('lower end of suppliers’ data'),
  },
  {
    name: 'MDF',
    title: 'MDF, dry use',
    family: 'board',
    density: 700,
    densityK: 600,
    modulus: 2500,
    poisson: 0.25,
    expansion: 8e-6,
    strength: { fm: 20, ft: 13, fc: 13, fv: 6.5 },
    source: remembered('EN 622-5 production minima and EN 12369-1'),
  },
];
