import type { Material } from '../../material.js';
import { remembered, seen } from './source.js';

const SEEN = seen('EN 1999-1-1 table 3.2b, in a copy that ends before 6082');
const REMEMBERED = remembered('EN 1999-1-1 table 3.2b');
const MODULUS = seen('TALAT 2301 training examples (European Aluminium Association, 1999)');

/** Alloy and temper, product, fo, fu in MPa, thickest wall mm, buckling class, fo and fu of the heat-affected zone (absent: unknown), seen. */
const ROWS: readonly (readonly [string, string, number, number, number, 'A' | 'B', number, number, boolean])[] = [
  ['6060-T5', 'extruded', 120, 160, 5, 'B', 0, 0, true],
  ['6060-T6', 'extruded', 140, 170, 15, 'A', 60, 100, true],
  ['6060-T6-drawn', 'drawn tube', 160, 215, 20, 'A', 60, 100, true],
  ['6060-T66', 'extruded', 160, 215, 3, 'A', 0, 0, true],
  ['6063-T6', 'extruded', 160, 195, 25, 'A', 0, 0, true],
  ['6061-T6', 'extruded', 240, 260, 20, 'A', 0, 0, true],
  ['6005A-T6', 'extruded', 225, 270, 5, 'A', 0, 0, true],
  ['6082-T6', 'extruded', 250, 290, 5, 'A', 125, 185, false],
  ['6082-T6-thick', 'extruded', 260, 310, 15, 'A', 125, 185, false],
];

/** Wrought aluminium alloys. Density, expansion and the classes of the rows without one in the copy: from memory. */
export const ALUMINIUM: readonly Material[] = ROWS.map(
  ([name, product, fo, fu, thickest, buckling, foHaz, fuHaz, read]) => ({
    name,
    title: `Aluminium ${name}, ${product}`,
    family: 'aluminium',
    density: 2700,
    modulus: 70000,
    shearModulus: 27000,
    poisson: 0.3,
    expansion: 23e-6,
    strength: { fo, fu, ...(foHaz > 0 ? { foHaz, fuHaz } : {}) },
    buckling,
    thickest,
    source: read ? SEEN : REMEMBERED,
    sources: {
      modulus: MODULUS,
      shearModulus: MODULUS,
      density: REMEMBERED,
      expansion: REMEMBERED,
      ...(name.startsWith('6060') ? {} : { buckling: REMEMBERED }),
      ...(name === '6061-T6' ? { thickest: REMEMBERED } : {}),
    },
  }),
);
