import { materialNamed } from '../../model/catalogue/resolve.js';
import type { Job } from '../../model/job/index.js';
import type { Material } from '../../model/material.js';
import type { PanelPart } from '../../model/parts.js';
import type { Face } from '../../model/truss.js';

/** What a face's panel is made of and how it sits: the face's own wish, else its group's, else the job's. */
export interface PanelChoice {
  readonly seating: PanelPart['seating'];
  /** mm */
  readonly thickness: number;
  readonly materialName: string;
  /** null: nobody knows the name. */
  readonly material: Material | null;
}

export function panelChoice(job: Job, face: Face): PanelChoice {
  const own = job.panels.faces[face.mark];
  const group = face.group === null ? undefined : job.panels.groups[face.group];
  const materialName = own?.material ?? group?.material ?? job.panels.material;
  return {
    seating: own?.seating ?? group?.seating ?? job.panels.seating,
    thickness: own?.thickness_mm ?? group?.thickness_mm ?? job.panels.thickness_mm,
    materialName,
    material: materialNamed(job, materialName),
  };
}
