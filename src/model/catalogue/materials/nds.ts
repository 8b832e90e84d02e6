import type { Material } from '../../material.js';
import { remembered } from './source.js';

const PSI = 6894.757293168e-6;
/** kg/m³ of water: specific gravity by dry mass and volume; 1.12 for the moisture carried. */
const WATER = 1000;

/** Grade, then psi: Fb Ft Fv Fc,perp Fc E Emin, then specific gravity. */
const ROWS: readonly (readonly [string, string, number, number, number, number, number, number, number, number])[] = [
  ['DFL-No1', 'Douglas fir-larch No. 1', 1000, 675, 180, 625, 1500, 1.7e6, 620000, 0.5],
  ['DFL-No2', 'Douglas fir-larch No. 2', 900, 575, 180, 625, 1350, 1.6e6, 580000, 0.5],
  ['HF-No2', 'Hem-fir No. 2', 850, 525, 150, 405, 1300, 1.3e6, 470000, 0.43],
  ['SPF-No2', 'Spruce-pine-fir No. 1/No. 2', 875, 450, 135, 425, 1150, 1.4e6, 510000, 0.42],
];

/** Dimension lumber, 2 to 4 in thick: reference design values before any adjustment, converted to MPa. */
export const NDS_LUMBER: readonly Material[] = ROWS.map(([name, title, fb, ft, fv, fcPerp, fc, e, emin, gravity]) => ({
  name,
  title,
  family: 'timber',
  density: Math.round(gravity * WATER * 1.12),
  modulus: e * PSI,
  modulus05: emin * PSI * 1.66,
  expansion: 5e-6,
  strength: { Fb: fb * PSI, Ft: ft * PSI, Fv: fv * PSI, FcPerp: fcPerp * PSI, Fc: fc * PSI, Emin: emin * PSI },
  source: remembered('NDS Supplement 2018 table 4A'),
  sources: { modulus05: remembered('Emin without its factor of 1.66, NDS appendix D') },
}));
