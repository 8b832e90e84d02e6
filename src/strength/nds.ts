import type { MemberActions } from '../model/solution.js';
import { resistanceOf } from './resistance.js';
import { governing, lacking, type Standard, type Verdict } from './standard.js';

/** Load duration factor CD, NDS 2018 table 2.3.2 (from memory): the duration classes of EN 1995-1-1 read as permanent, ten years, seven days, wind, impact. */
const CD: Readonly<Record<MemberActions['duration'], number>> = {
  permanent: 0.9,
  long: 1,
  medium: 1.25,
  short: 1.6,
  instantaneous: 2,
};
/** Wet service factor CM of dimension lumber above 19 % moisture, NDS Supplement table 4A (from memory): service class 3. */
const WET = { Fb: 0.85, Ft: 1, Fv: 0.97, Fc: 0.8, E: 0.9 } as const;
/** Largest le/d, NDS 3.7.1.4. */
const MOST_SLENDER = 50;
/** c of NDS 3.7.1.5: sawn lumber, round timber. */
const C_FACTOR = { rectangle: 0.8, round: 0.85 } as const;
const INCH = 25.4;

/** Size factor CF of dimension lumber by its nominal depth, NDS Supplement table 4A (from memory): bending and tension, then compression. Depth in mm. */
function sizeFactor(depth: number): { readonly bending: number; readonly compression: number } {
  const inches = depth / INCH;
  if (inches <= 3.5) return { bending: 1.5, compression: 1.15 };
  if (inches <= 4.5) return { bending: 1.4, compression: 1.1 };
  if (inches <= 5.5) return { bending: 1.3, compression: 1.1 };
  if (inches <= 7.25) return { bending: 1.2, compression: 1.05 };
  if (inches <= 9.25) return { bending: 1.1, compression: 1 };
  return inches <= 11.25 ? { bending: 1, compression: 1 } : { bending: 0.9, compression: 0.9 };
}

/** Column stability factor CP = (1 + a)/2c - sqrt(((1 + a)/2c)² - a/c), a = FcE / Fc*; NDS 3.7.1.5. Any unit of stress. */
export function columnStability(fce: number, fcStar: number, c: number): number {
  const a = fce / fcStar;
  const half = (1 + a) / (2 * c);
  return half - Math.sqrt(half ** 2 - a / c);
}

/** NDS 2018 in brief, allowable stress, sawn lumber: 3.3, 3.4, 3.6 to 3.9 with CD, CM, CF and CP; beam stability CL is 1 (struts are bent little). */
export const NDS: Standard = {
  name: 'NDS',
  missing: (material) => lacking(material, ['Fb', 'Ft', 'Fv', 'Fc', 'Emin']),
  outOfScope({ shape, bucklingLength }) {
    const slender = bucklingLength / equivalentDepth(shape);
    return slender > MOST_SLENDER ? `le/d of ${slender.toFixed(0)} is above ${MOST_SLENDER} (NDS 3.7.1.4)` : null;
  },
  judge({ shape, material, bucklingLength }, a, { serviceClass }) {
    const r = resistanceOf(shape);
    const f = material.strength;
    const cd = CD[a.duration];
    const wet = serviceClass === 3 ? WET : { Fb: 1, Ft: 1, Fv: 1, Fc: 1, E: 1 };
    const deep = shape.kind === 'rectangle' ? Math.max(shape.width, shape.height) : shape.diameter;
    const size = sizeFactor(deep);
    const fb = f['Fb']! * cd * wet.Fb * size.bending;
    const [my, mz] = [Math.abs(a.momentY) / r.wy / fb, Math.abs(a.momentZ) / r.wz / fb];
    const bent = r.round ? Math.hypot(my, mz) : my + mz;
    const checks: Verdict[] = [];
    if (a.axial >= 0) {
      const ft = f['Ft']! * cd * wet.Ft * size.bending;
      checks.push({
        utilisation: a.axial / r.area / ft + bent,
        rule: bent > 0 ? 'NDS 3.9.1 (3.9-1)' : 'NDS 3.8.1',
      });
    } else {
      const fcStar = f['Fc']! * cd * wet.Fc * size.compression;
      const emin = f['Emin']! * wet.E;
      const fce = (depth: number): number => (0.822 * emin) / (bucklingLength / depth) ** 2;
      const weak = fce(equivalentDepth(shape));
      const fc =
        fcStar * columnStability(weak, fcStar, shape.kind === 'rectangle' ? C_FACTOR.rectangle : C_FACTOR.round);
      const stress = -a.axial / r.area;
      // Each bending term grows with the Euler stress of its own axis; past it the axial term alone is above 1.
      const grow = (depth: number): number => (stress < fce(depth) ? 1 / (1 - stress / fce(depth)) : 1);
      const grown =
        shape.kind === 'rectangle'
          ? my * grow(shape.height) + mz * grow(shape.width)
          : bent * grow(equivalentDepth(shape));
      checks.push({
        utilisation: bent > 0 ? (stress / fc) ** 2 + grown : stress / fc,
        rule: bent > 0 ? 'NDS 3.9.2 (3.9-3)' : 'NDS 3.7.1',
      });
    }
    const shear = (r.shearPeak * Math.hypot(a.shearY, a.shearZ)) / r.area + Math.abs(a.torsion) / r.wt;
    if (shear > 0) checks.push({ utilisation: shear / (f['Fv']! * cd * wet.Fv), rule: 'NDS 3.4.2' });
    return governing(checks);
  },
};

/** Depth of the rectangle that buckles alike: the least side, or sqrt(12) radii of gyration of a round section (a square of equal inertia and area, NDS 3.7.3). */
function equivalentDepth(shape: Parameters<typeof resistanceOf>[0]): number {
  if (shape.kind === 'rectangle') return Math.min(shape.width, shape.height);
  const { iy, iz } = resistanceOf(shape);
  return Math.sqrt(12) * Math.min(iy, iz);
}
