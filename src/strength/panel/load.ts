import type { Job } from '../../model/job/index.js';
import type { PanelPart } from '../../model/parts.js';
import type { MemberActions } from '../../model/solution.js';
import { GRAVITY } from '../../statics/loads/load-case.js';
import { SELF_WEIGHT } from '../../statics/loads/self-weight.js';

/** A combination as panels need it: factors by case name. */
export interface PanelCombination {
  readonly name: string;
  readonly duration: MemberActions['duration'];
  readonly factors: ReadonlyMap<string, number>;
}

/** MPa for one kN/m². */
const KN_PER_M2 = 1e-3;
/** MPa of 1 mm of a material of 1 kg/m³ in a field of 1 m/s². */
const WEIGHT = 1e-9;

/**
 * Pressure square to the panel by case, MPa, inward positive. A vertical pressure p per plan area presses by p |nz| nz (n the outward
 * normal); the panel's own weight by rho g t nz: it hangs outward where the panel faces down.
 */
export function panelPressures(part: PanelPart, job: Job): ReadonlyMap<string, number> {
  const nz = part.frame.z[2];
  const pressures = new Map<string, number>();
  if (job.analysis.selfWeight && part.material)
    pressures.set(SELF_WEIGHT, part.material.density * GRAVITY * part.thickness * WEIGHT * nz);
  for (const c of job.loads.cases) {
    if (c.pressure_kN_per_m2 === undefined) continue;
    if (c.groups !== undefined && (part.group === null || !c.groups.includes(part.group))) continue;
    const p = c.pressure_kN_per_m2 * KN_PER_M2;
    pressures.set(c.name, c.direction === 'vertical' ? p * Math.abs(nz) * nz : p);
  }
  return pressures;
}

/** Pressure of a combination, MPa, inward positive. */
export function combinedPressure(combination: PanelCombination, pressures: ReadonlyMap<string, number>): number {
  let q = 0;
  for (const [name, factor] of combination.factors) q += factor * (pressures.get(name) ?? 0);
  return q;
}

/** Names of the cases that stand for good. */
export const standingCases = (job: Job): readonly string[] => [
  SELF_WEIGHT,
  ...job.loads.cases.filter((c) => c.kind === 'permanent').map((c) => c.name),
];
