import type { Material, Source } from '../../material.js';
import { remembered } from './source.js';

/** What a 5 % fractile with defects keeps of a clear-wood mean: from memory, a judgement; slope of grain is the usual culprit. */
const CLEAR_WOOD_SHARE = 0.5;
/** ft over fm, as EN 384 has it for softwood: from memory. Clear wood does better; a dowel with sloping grain does not. */
const TENSION_SHARE = 0.6;

interface ClearWood {
  readonly name: string;
  readonly title: string;
  readonly density: number;
  readonly modulus: number;
  /** Clear-wood means, MPa: modulus of rupture, compression along the grain, shear along the grain. */
  readonly rupture: number;
  readonly compression: number;
  readonly shear: number;
  readonly text: string;
  readonly mark: Source['mark'];
}

/** Densities of the species given by specific gravity: dry mass over volume at 12 %, times 1.12. Ranges enter with their lower end. */
const SPECIES: readonly ClearWood[] = [
  {
    name: 'beech-dowel',
    title: 'Beech dowel, ungraded',
    density: 710,
    modulus: 14000,
    rupture: 110,
    compression: 55,
    shear: 12,
    text: 'half the clear-wood means of European beech (from memory)',
    mark: 'memory',
  },
  {
    name: 'american-beech-dowel',
    title: 'American beech dowel, ungraded',
    density: 717,
    modulus: 11900,
    rupture: 103,
    compression: 50.3,
    shear: 13.9,
    text: 'half the clear-wood means of a forest service handbook, in a copy',
    mark: 'seen',
  },
  {
    name: 'yellow-birch-dowel',
    title: 'Yellow birch dowel, ungraded',
    density: 694,
    modulus: 13900,
    rupture: 114,
    compression: 56.3,
    shear: 13,
    text: 'half the clear-wood means of a forest service handbook, in a copy',
    mark: 'seen',
  },
  {
    name: 'birch-dowel',
    title: 'Birch dowel, ungraded',
    density: 616,
    modulus: 11000,
    rupture: 85,
    compression: 39.2,
    shear: 8.3,
    text: 'half the clear-wood means of paper birch in a forest service handbook, in a copy',
    mark: 'seen',
  },
  {
    name: 'ramin-dowel',
    title: 'Ramin dowel, ungraded',
    density: 655,
    modulus: 15550,
    rupture: 88,
    compression: 48.8,
    shear: 8.5,
    text: 'half the lower of two published clear-wood means, which differ by a third',
    mark: 'seen',
  },
  {
    name: 'pine-dowel',
    title: 'Pine dowel, ungraded',
    density: 510,
    modulus: 10000,
    rupture: 80,
    compression: 40,
    shear: 8,
    text: 'half the clear-wood means of Scots pine (from memory)',
    mark: 'memory',
  },
];

/** Shop dowels: no strength class comes with one, so every value is unverified and judged by allowable stress. */
export const DOWELS: readonly Material[] = SPECIES.map((wood) => ({
  name: wood.name,
  title: wood.title,
  family: 'timber',
  density: wood.density,
  modulus: wood.modulus,
  expansion: 5e-6,
  strength: {
    fm: wood.rupture * CLEAR_WOOD_SHARE,
    ft: wood.rupture * CLEAR_WOOD_SHARE * TENSION_SHARE,
    fc: wood.compression * CLEAR_WOOD_SHARE,
    fv: wood.shear * CLEAR_WOOD_SHARE,
  },
  source: { text: wood.text, mark: wood.mark, verified: false },
  sources: {
    fm: remembered('modulus of rupture, halved'),
    ft: remembered('0.6 of fm, EN 384'),
    expansion: remembered('wood along the grain'),
  },
}));
