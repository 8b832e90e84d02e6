import type { Material } from '../../material.js';
import { FROM_MEMORY, remembered, seen } from './source.js';

const SEEN = seen('EN 14080:2013 table 5, as quoted in an open university handbook of timber');
const REMEMBERED = remembered('EN 14080:2013 table 5');

/** Class, then MPa: fm,k ft,0,k fc,0,k E0,mean E0,05, then kg/m³: rho_k rho_mean, then whether the row was seen. */
const ROWS: readonly (readonly [string, number, number, number, number, number, number, number, boolean])[] = [
  ['GL24h', 24, 19.2, 24, 11500, 9600, 385, 420, true],
  ['GL26h', 26, 20.8, 26, 12100, 10100, 405, 445, false],
  ['GL28h', 28, 22.3, 28, 12600, 10500, 425, 460, true],
  ['GL30h', 30, 24.0, 30, 13600, 11300, 430, 480, false],
  ['GL32h', 32, 25.6, 32, 14200, 11800, 440, 490, true],
];

/** Homogeneous glued laminated timber. fc,90,k 2.5, fv,k 3.5, ft,90,k 0.5, E90 300, G 650 hold for every class. */
export const EN_14080: readonly Material[] = ROWS.map(
  ([name, fmk, ft0k, fc0k, modulus, modulus05, densityK, density, read]) => ({
    name,
    title: `Glued laminated timber ${name}`,
    family: 'glulam',
    density,
    densityK,
    modulus,
    modulus05,
    modulus90: 300,
    shearModulus: 650,
    expansion: 5e-6,
    strength: { fmk, ft0k, fc0k, fc90k: 2.5, fvk: 3.5, ft90k: 0.5 },
    source: read ? SEEN : REMEMBERED,
    sources: { expansion: FROM_MEMORY, ft90k: REMEMBERED },
  }),
);
