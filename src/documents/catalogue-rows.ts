import { MATERIALS } from '../model/catalogue/materials/index.js';
import { SECTIONS } from '../model/catalogue/sections/index.js';
import type { Material } from '../model/material.js';
import { sourceOf } from '../model/material.js';
import { type Section, sectionProperties } from '../model/section.js';

/** A section of the catalogue as a row. */
export interface SectionRow {
  readonly name: string;
  readonly shape: Section['shape'];
  readonly material: string;
  readonly area_mm2: number;
  readonly mass_kg_per_m: number;
}

/** One value of a material with where it comes from; `unit` is empty for a ratio or a class. */
export interface ValueRow {
  readonly value: string;
  readonly amount: number | string;
  readonly unit: string;
  readonly source: string;
  readonly mark: string;
  readonly verified: boolean;
}

export interface MaterialRow {
  readonly name: string;
  readonly title: string;
  readonly family: string;
  readonly values: readonly ValueRow[];
  readonly hazards: readonly string[];
}

/** Everything in the catalogue whose name, title or material holds the word, whatever the case; all of it for "". */
export function catalogueRows(word: string): {
  readonly sections: readonly SectionRow[];
  readonly materials: readonly MaterialRow[];
} {
  const wanted = word.toLowerCase();
  const holds = (...texts: readonly string[]): boolean => texts.some((t) => t.toLowerCase().includes(wanted));
  const sections = [...SECTIONS.values()].filter((s) => holds(s.name, s.material));
  const named = new Set(sections.map((s) => s.material));
  return {
    sections: sections.map(sectionRow),
    materials: [...MATERIALS.values()].filter((m) => named.has(m.name) || holds(m.name, m.title)).map(materialRow),
  };
}

function sectionRow(section: Section): SectionRow {
  const { area } = sectionProperties(section.shape);
  const { density } = MATERIALS.get(section.material)!;
  const { name, shape, material } = section;
  return { name, shape, material, area_mm2: area, mass_kg_per_m: (area * density) / 1e6 };
}

const FIELDS = [
  ['density', 'kg/m³'],
  ['densityK', 'kg/m³'],
  ['modulus', 'MPa'],
  ['modulus05', 'MPa'],
  ['modulus90', 'MPa'],
  ['shearModulus', 'MPa'],
  ['poisson', ''],
  ['expansion', '1/K'],
  ['softening', '°C'],
  ['buckling', ''],
  ['thickest', 'mm'],
] as const satisfies readonly (readonly [keyof Material, string])[];

/** A material with its values, each with its source. */
export function materialRow(material: Material): MaterialRow {
  const row = (value: string, amount: number | string, unit: string): ValueRow => {
    const { text, mark, verified } = sourceOf(material, value);
    return { value, amount, unit, source: text, mark, verified };
  };
  return {
    name: material.name,
    title: material.title,
    family: material.family,
    values: [
      ...FIELDS.flatMap(([key, unit]) => (material[key] === undefined ? [] : [row(key, material[key], unit)])),
      ...Object.entries(material.strength).map(([symbol, amount]) => row(symbol, amount, 'MPa')),
    ],
    hazards: material.hazards ?? [],
  };
}
