import { gammaM, kDef } from '../../model/catalogue/timber-factors.js';
import type { Job } from '../../model/job/index.js';
import type { Material } from '../../model/material.js';
import type { Parts } from '../../model/parts.js';
import { serviceClassOf } from '../../model/service-class.js';

/** E0.05 / E0,mean of softwood in EN 338, for timber whose material does not say: the lower of soft- and hardwood. */
const E05_SHARE = 0.67;

/**
 * What is left of a material's mean stiffness when stability is verified: E0.05 / gammaM for timber (EN 1995-1-1 2.2.2 and 2.4.1), and
 * 1 / (1 + kdef) of it for the permanent share of the load; 1 for what does not creep by that rule.
 */
export function designShare(job: Job, material: Material, permanentShare: number): number {
  if (material.family !== 'timber' && material.family !== 'glulam') return 1;
  const e05 = (material.modulus05 ?? E05_SHARE * material.modulus) / material.modulus;
  return e05 / gammaM(material.family) / (1 + kDef(material.family, serviceClassOf(job)) * permanentShare);
}

/** The least of it over the struts. */
export function designStiffness(job: Job, parts: Parts, permanentShare: number): number {
  const materials = new Set(parts.struts.flatMap((s) => (s.material ? [s.material] : [])));
  return [...materials].reduce((least, m) => Math.min(least, designShare(job, m, permanentShare)), 1);
}
