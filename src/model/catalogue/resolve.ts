import type { Job } from '../job/index.js';
import type { Material } from '../material.js';
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
  return {
    ...(base ?? { family: 'board' as const }),
    name,
    title: own.title ?? base?.title ?? name,
    density,
    modulus,
    ...(own.softening_C !== undefined ? { softening: own.softening_C } : {}),
    strength: { ...base?.strength, ...own.strength_MPa },
    source: own.source ? { text: own.source, mark: 'user', verified: true } : (base?.source ?? UNSTATED),
  };
}

const UNSTATED = {
  text: 'given in the job without a source',
  mark: 'user',
  verified: false,
} as const;
