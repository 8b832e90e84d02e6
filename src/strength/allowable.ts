import { resistanceOf } from './resistance.js';
import { governing, lacking, type Standard, type Verdict } from './standard.js';

/**
 * Plain allowable stress for models: ultimate strengths over one factor of safety.
 * Tension N F / (A ft); compression N F / Nu with 1 / Nu = 1 / (A fc) + 1 / NE (Rankine's formula, Rankine 1858, from memory), NE = pi² E I / L²;
 * bending M F / (W fm), grown by 1 / (1 - N F / NE) under compression (Timoshenko and Gere, Theory of Elastic Stability, 1.11, from memory);
 * shear by the peak stress. E is the mean: the factor stands for its scatter too.
 */
export const ALLOWABLE: Standard = {
  name: 'allowable stress',
  missing: (material) => lacking(material, ['ft', 'fc', 'fm', 'fv']),
  outOfScope: () => null,
  judge({ shape, material, bucklingLength }, actions, { factor }) {
    const r = resistanceOf(shape);
    const { ft, fc, fm, fv } = material.strength as Readonly<Record<string, number>> & {
      ft: number;
      fc: number;
      fm: number;
      fv: number;
    };
    const weakest = Math.min(r.iy, r.iz);
    const euler = (Math.PI ** 2 * material.modulus * r.area * weakest ** 2) / bucklingLength ** 2;
    const load = Math.abs(actions.axial) * factor;
    const compressed = actions.axial < 0;
    const axial = compressed ? load * (1 / (r.area * fc) + 1 / euler) : load / (r.area * ft);
    const [my, mz] = [Math.abs(actions.momentY) / (r.wy * fm), Math.abs(actions.momentZ) / (r.wz * fm)];
    const bent = factor * (r.round ? Math.hypot(my, mz) : my + mz);
    // Past its Euler load the growth has no meaning, and the axial term alone is above 1 already.
    const growth = compressed && load < euler ? 1 / (1 - load / euler) : 1;
    const rule = compressed
      ? `allowable stress, factor ${factor}, compression${bent > 0 ? ' with bending' : ' with buckling'}`
      : `allowable stress, factor ${factor}, ${bent > 0 ? 'tension with bending' : 'tension'}`;
    const checks: Verdict[] = [{ utilisation: axial + bent * growth, rule }];
    const shear =
      (r.shearPeak * Math.hypot(actions.shearY, actions.shearZ)) / r.area + Math.abs(actions.torsion) / r.wt;
    if (shear > 0)
      checks.push({ utilisation: (factor * shear) / fv, rule: `allowable stress, factor ${factor}, shear` });
    return governing(checks);
  },
};
