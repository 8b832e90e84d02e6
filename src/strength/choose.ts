import type { Job } from '../model/job/index.js';
import type { Material } from '../model/material.js';
import { ALLOWABLE } from './allowable.js';
import { EN_1995 } from './en1995/index.js';
import type { Standard } from './standard.js';

/** The standards by the name that a job writes. */
const BY_NAME: Readonly<Record<string, Standard>> = { 'EN 1995-1-1': EN_1995, allowable: ALLOWABLE };

/** The standard that judges struts of a material: the job's, or by the family; timber without a strength class by allowable stress. */
export function standardFor(job: Job, material: Material): Standard {
  const asked = job.strength.standard;
  if (asked !== 'auto') return BY_NAME[asked] ?? ALLOWABLE;
  const timber = material.family === 'timber' || material.family === 'glulam';
  if (timber && material.strength['fmk'] !== undefined) return EN_1995;
  return ALLOWABLE;
}
