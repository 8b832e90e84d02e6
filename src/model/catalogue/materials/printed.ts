import type { Material, Source } from '../../material.js';
import { remembered } from './source.js';

/** Strength across layers over strength in the layers where no test says otherwise: judgement, within published scatter. */
const ACROSS_FILAMENT = 0.5;
const ACROSS_POWDER = 0.8;
/** Shear strength over tensile strength of a plastic that yields: 1/sqrt(3) rounded down. */
const SHEAR = 0.5;

const shortTerm = (text: string): Source => ({
  text: `short-term tests, ${text}; not characteristic values`,
  mark: 'seen',
  verified: false,
});
const REVIEW = shortTerm('Processes 2025, 13, 2733');
const IN_PLANE = shortTerm('JMMP 2026, 10(2), 64, lower end, printed in the layers');
const POWDER = remembered('supplier data of sintered PA12, lower end');

interface Plastic {
  readonly name: string;
  readonly title: string;
  readonly density: number;
  readonly modulus: number;
  readonly softening: number;
  readonly tension: number;
  readonly across: number;
  readonly source: Source;
  readonly sources: Readonly<Record<string, Source>>;
}

const soft = (text: string): Source => remembered(text);

const PLASTICS: readonly Plastic[] = [
  {
    name: 'PLA-print',
    title: 'PLA, printed from filament',
    density: 1250,
    modulus: 3500,
    softening: 60,
    tension: 53,
    across: ACROSS_FILAMENT,
    source: REVIEW,
    sources: { softening: soft('glass transition') },
  },
  {
    name: 'PETG-print',
    title: 'PETG, printed from filament',
    density: 1270,
    modulus: 2000,
    softening: 71,
    tension: 47,
    across: ACROSS_FILAMENT,
    source: IN_PLANE,
    sources: { density: REVIEW, modulus: REVIEW, softening: REVIEW },
  },
  {
    name: 'ABS-print',
    title: 'ABS, printed from filament',
    density: 1040,
    modulus: 2100,
    softening: 100,
    tension: 40,
    across: ACROSS_FILAMENT,
    source: REVIEW,
    sources: { softening: soft('glass transition, lower end') },
  },
  {
    name: 'ASA-print',
    title: 'ASA, printed from filament',
    density: 1070,
    modulus: 2000,
    softening: 100,
    tension: 40,
    across: ACROSS_FILAMENT,
    source: remembered('supplier data'),
    sources: {},
  },
  {
    name: 'PA12-powder',
    title: 'PA12, sintered from powder',
    density: 1010,
    modulus: 1600,
    softening: 90,
    tension: 45,
    across: ACROSS_POWDER,
    source: POWDER,
    sources: { softening: soft('deflection temperature at 1.8 MPa, ISO 75') },
  },
  {
    name: 'resin-print',
    title: 'Tough resin, printed by light',
    density: 1150,
    modulus: 1800,
    softening: 50,
    tension: 40,
    across: 1,
    source: remembered('supplier data'),
    sources: {},
  },
];

/** Printed plastics. ft, fc, fv hold in the layers, ftZ across them; all unverified until the job gives a test value. */
export const PRINTED: readonly Material[] = PLASTICS.map((p) => ({
  name: p.name,
  title: p.title,
  family: 'plastic-print',
  density: p.density,
  modulus: p.modulus,
  softening: p.softening,
  poisson: 0.38,
  strength: { ft: p.tension, ftZ: p.tension * p.across, fc: p.tension, fv: p.tension * SHEAR },
  source: p.source,
  sources: {
    ...p.sources,
    ftZ: remembered('across layers, a judgement'),
    fv: remembered('half of ft, a judgement'),
    poisson: remembered('plastics'),
  },
}));
