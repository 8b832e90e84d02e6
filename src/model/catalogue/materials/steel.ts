import type { Material } from '../../material.js';
import { remembered, seen } from './source.js';

const SEEN = seen('EN 1993-1-1 table 3.1 (t <= 40 mm), as quoted in an open university handbook of steel');
const CURVE = remembered('EN 1993-1-1:2005 table 6.2');

/** Grade, fy, fu in MPa. S355: fu by the corrigendum; the text of 2005 has 510. */
const GRADES = [
  ['S235', 235, 360],
  ['S275', 275, 430],
  ['S355', 355, 490],
] as const;

/** Product, suffix of the name, buckling curve of EN 1993-1-1 table 6.2. */
const PRODUCTS = [
  ['bar', '', 'c'],
  ['cold-formed hollow section, EN 10219', 'H-cold', 'c'],
  ['hot-finished hollow section, EN 10210', 'H-hot', 'a'],
] as const;

/** Structural steels as bars and hollow sections. */
export const STEEL: readonly Material[] = GRADES.flatMap(([grade, fy, fu]) =>
  PRODUCTS.map(
    ([product, suffix, buckling]): Material => ({
      name: `${grade}${suffix}`,
      title: `Steel ${grade}, ${product}`,
      family: 'steel',
      density: 7850,
      modulus: 210000,
      shearModulus: 81000,
      poisson: 0.3,
      expansion: 12e-6,
      strength: { fy, fu },
      buckling,
      thickest: 40,
      source: SEEN,
      sources: { buckling: CURVE, ...(grade === 'S355' ? { fu: remembered('EN 1993-1-1 corrigendum') } : {}) },
    }),
  ),
);
