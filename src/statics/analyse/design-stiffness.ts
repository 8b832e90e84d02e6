import type { Job } from '../../model/job/index.js';
import type { Material } from '../../model/material.js';
import type { Parts } from '../../model/parts.js';

/** gammaM of EN 1995-1-1 table 2.3. */
const GAMMA_M: Partial<Record<Material['family'], number>> = { timber: 1.3, glulam: 1.25 };
/** kdef of EN 1995-1-1 table 3.2, solid timber and glulam, by service class. */
const KDEF = [0.6, 0.8, 2.0] as const;
/** E0.05 / E0,mean of softwood in EN 338, for timber whose material does not say: the lower of soft- and hardwood. */
const E05_SHARE = 0.67;

/**
 * What is left of the mean stiffness when stability is verified: E0.05 / gammaM for timber (EN 1995-1-1 2.2.2 and 2.4.1), and
 * 1 / (1 + kdef) of it for the permanent share of the load. The least over the struts' materials; 1 for metals.
 */
export function designStiffness(job: Job, parts: Parts, permanentShare: number): number {
  const kdef = KDEF[(job.strength.serviceClass ?? 1) - 1]!;
  let least = 1;
  for (const { material } of parts.struts) {
    if (!material) continue;
    const gamma = GAMMA_M[material.family];
    if (gamma === undefined) continue;
    const e05 = (material.modulus05 ?? E05_SHARE * material.modulus) / material.modulus;
    least = Math.min(least, e05 / gamma / (1 + kdef * permanentShare));
  }
  return least;
}
