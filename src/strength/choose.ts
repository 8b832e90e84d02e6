import type { Job } from '../model/job/index.js';
import type { Material } from '../model/material.js';
import { ALLOWABLE } from './allowable.js';
import { EN_1993 } from './en1993/index.js';
import { EN_1995 } from './en1995/index.js';
import { EN_1999 } from './en1999/index.js';
import { NDS } from './nds.js';
import type { Standard } from './standard.js';

/** The standards by the name that a job writes. */
const BY_NAME: Readonly<Record<Exclude<Job['strength']['standard'], 'auto'>, Standard>> = {
  'EN 1993-1-1': EN_1993,
  'EN 1995-1-1': EN_1995,
  'EN 1999-1-1': EN_1999,
  NDS,
  allowable: ALLOWABLE,
};

/** The standard that judges struts of a material: the job's, or by the family; timber without a strength class by allowable stress. */
export function standardFor(job: Job, material: Material): Standard {
  const asked = job.strength.standard;
  if (asked !== 'auto') return BY_NAME[asked];
  if (material.family === 'steel') return EN_1993;
  if (material.family === 'aluminium') return EN_1999;
  if (material.family !== 'timber' && material.family !== 'glulam') return ALLOWABLE;
  if (material.strength['fmk'] !== undefined) return EN_1995;
  return material.strength['Fb'] === undefined ? ALLOWABLE : NDS;
}
