import type { Job } from '../job/index.js';
import type { Material, Source } from '../material.js';
import type { Section } from '../section.js';
import { MATERIALS } from './materials/index.js';
import { SECTIONS } from './sections/index.js';

/** The section of a name, from the job first, then the catalogue; null where neither has it. */
export function sectionNamed(job: Job, name: string): Section | null {
  const own = job.sections[name];
  if (!own) return SECTIONS.get(name) ?? null;
  const { shape } = own;
  return {
    name,
    material: own.material,
    measured: own.measured_mm ?? null,
    shape:
      shape.kind === 'round'
        ? { kind: 'round', diameter: shape.diameter_mm }
        : shape.kind === 'tube'
          ? { kind: 'tube', diameter: shape.diameter_mm, wall: shape.wall_mm }
          : {
              kind: 'rectangle',
              width: shape.width_mm,
              height: shape.height_mm,
            },
  };
}

/** The material of a name, from the job first, then the catalogue; null where neither has it or a value it needs is missing. */
export function materialNamed(job: Job, name: string): Material | null {
  const own = job.materials[name];
  if (!own) return MATERIALS.get(name) ?? null;
  const base = MATERIALS.get(own.like ?? name);
  const density = own.density_kg_per_m3 ?? base?.density;
  const modulus = own.modulus_MPa ?? base?.modulus;
  if (density === undefined || modulus === undefined) return null;
  const source: Source = own.source ? { text: own.source, mark: 'user', verified: true } : UNSTATED;
  const values = known({
    modulus05: own.modulus05_MPa,
    shearModulus: own.shearModulus_MPa,
    poisson: own.poisson,
    expansion: own.expansion_per_K,
    densityK: own.densityK_kg_per_m3,
    softening: own.softening_C,
    buckling: own.buckling,
  });
  const given = [
    ...(own.density_kg_per_m3 === undefined ? [] : ['density']),
    ...(own.modulus_MPa === undefined ? [] : ['modulus']),
    ...Object.keys(values),
    ...Object.keys(own.strength_MPa),
  ];
  return {
    ...(base ?? { family: 'board' as const }),
    ...(own.family ? { family: own.family } : {}),
    name,
    title: own.title ?? base?.title ?? name,
    density,
    modulus,
    ...values,
    strength: { ...base?.strength, ...own.strength_MPa },
    // What the job does not give keeps the source it had.
    source: base?.source ?? source,
    sources: { ...base?.sources, ...Object.fromEntries(given.map((value) => [value, source])) },
  };
}

/** The entries that have a value. */
function known<T extends Readonly<Record<string, unknown>>>(values: T): { [K in keyof T]?: Exclude<T[K], undefined> } {
  return Object.fromEntries(Object.entries(values).filter(([, v]) => v !== undefined)) as ReturnType<typeof known<T>>;
}

const UNSTATED: Source = { text: 'given in the job without a source', mark: 'user', verified: false };
