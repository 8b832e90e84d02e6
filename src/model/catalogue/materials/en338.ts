import type { Material, Source } from '../../material.js';
import { FROM_MEMORY } from './source.js';

const SEEN: Source = {
  text: 'EN 338:2016 table 1, as quoted in an open university handbook of timber',
  mark: 'seen',
  verified: true,
};

/** Class, then MPa: fm,k ft,0,k fc,0,k fc,90,k fv,k E0,mean E0,05 E90 Gmean, then kg/m³: rho_k rho_mean. */
type Row = readonly [string, number, number, number, number, number, number, number, number, number, number, number];

const ROWS: readonly Row[] = [
  ['C14', 14, 7.2, 16, 2.0, 3.0, 7000, 4700, 230, 440, 290, 350],
  ['C16', 16, 8.5, 17, 2.2, 3.2, 8000, 5400, 270, 500, 310, 370],
  ['C18', 18, 10, 18, 2.2, 3.4, 9000, 6000, 300, 560, 320, 380],
  ['C20', 20, 11.5, 19, 2.3, 3.6, 9500, 6400, 320, 590, 330, 400],
  ['C22', 22, 13, 20, 2.4, 3.8, 10000, 6700, 330, 630, 340, 410],
  ['C24', 24, 14.5, 21, 2.5, 4.0, 11000, 7400, 370, 690, 350, 420],
  ['C27', 27, 16.5, 22, 2.5, 4.0, 11500, 7700, 380, 720, 360, 430],
  ['C30', 30, 19, 24, 2.7, 4.0, 12000, 8000, 400, 750, 380, 460],
  ['C35', 35, 22.5, 25, 2.7, 4.0, 13000, 8700, 430, 810, 390, 470],
  ['C40', 40, 26, 27, 2.8, 4.0, 14000, 9400, 470, 880, 400, 480],
  ['C45', 45, 30, 29, 2.9, 4.0, 15000, 10100, 500, 940, 410, 490],
  ['C50', 50, 33.5, 30, 3.0, 4.0, 16000, 10700, 530, 1000, 430, 520],
  ['D18', 18, 11, 18, 4.8, 3.5, 9500, 8000, 630, 590, 475, 570],
  ['D24', 24, 14, 21, 4.9, 3.7, 10000, 8400, 670, 630, 485, 580],
  ['D30', 30, 18, 24, 5.3, 3.9, 11000, 9200, 730, 690, 530, 640],
  ['D35', 35, 21, 25, 5.4, 4.1, 12000, 10100, 800, 750, 540, 650],
  ['D40', 40, 24, 27, 5.5, 4.2, 13000, 10900, 870, 810, 550, 660],
  ['D50', 50, 30, 30, 6.2, 4.5, 14000, 11800, 930, 880, 620, 740],
  ['D60', 60, 36, 33, 10.5, 4.8, 17000, 14300, 1130, 1060, 700, 840],
  ['D70', 70, 42, 36, 12.0, 5.0, 20000, 16800, 1330, 1250, 800, 960],
];

/** fc,90,k that the handbook prints otherwise (2.8 and 3.9; the second is plainly a slip). */
const REMEMBERED: ReadonlySet<string> = new Set(['C35', 'C45']);

/** Sawn timber, softwood C and hardwood D. Expansion along the grain: from memory. */
export const EN_338: readonly Material[] = ROWS.map(
  ([name, fmk, ft0k, fc0k, fc90k, fvk, modulus, modulus05, modulus90, shearModulus, densityK, density]) => ({
    name,
    title: `Sawn ${name.startsWith('C') ? 'softwood' : 'hardwood'} ${name}`,
    family: 'timber',
    density,
    densityK,
    modulus,
    modulus05,
    modulus90,
    shearModulus,
    expansion: 5e-6,
    strength: { fmk, ft0k, fc0k, fc90k, fvk, ft90k: name.startsWith('C') ? 0.4 : 0.6 },
    source: SEEN,
    sources: {
      expansion: FROM_MEMORY,
      ...(REMEMBERED.has(name) ? { fc90k: { text: 'EN 338:2016 table 1', mark: 'memory', verified: false } } : {}),
    },
  }),
);
