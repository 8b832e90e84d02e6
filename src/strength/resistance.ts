import type { SectionShape } from '../model/section.js';
import { sectionProperties } from '../model/section.js';

/** What stresses are made from; mm, mm², mm³. Indices y and z: bending about that local axis. */
export interface Resistance {
  readonly area: number;
  readonly wy: number;
  readonly wz: number;
  /** Plastic moduli. */
  readonly wply: number;
  readonly wplz: number;
  /** Torsion modulus: largest shear stress = T / wt. */
  readonly wt: number;
  /** Radii of gyration. */
  readonly iy: number;
  readonly iz: number;
  /** Largest shear stress over V / area: 3/2 rectangle, 4/3 round, 2 thin ring. */
  readonly shearPeak: number;
  /** No corner stress: moments about y and z act as their resultant. */
  readonly round: boolean;
}

/** Elastic and plastic section values in closed form. Rectangle in torsion by Roark, table of torsion, case 4 (from memory). */
export function resistanceOf(shape: SectionShape): Resistance {
  const { area, iy, iz } = sectionProperties(shape);
  const radii = { iy: Math.sqrt(iy / area), iz: Math.sqrt(iz / area) };
  if (shape.kind === 'rectangle') {
    const { width: b, height: h } = shape;
    const [long, short] = b > h ? [b / 2, h / 2] : [h / 2, b / 2];
    return {
      area,
      wy: (b * h * h) / 6,
      wz: (h * b * b) / 6,
      wply: (b * h * h) / 4,
      wplz: (h * b * b) / 4,
      wt: (8 * long ** 2 * short ** 2) / (3 * long + 1.8 * short),
      ...radii,
      shearPeak: 1.5,
      round: false,
    };
  }
  const outer = shape.diameter;
  const inner = shape.kind === 'tube' ? outer - 2 * shape.wall : 0;
  const w = (2 * iy) / outer;
  const wpl = (outer ** 3 - inner ** 3) / 6;
  return {
    area,
    wy: w,
    wz: w,
    wply: wpl,
    wplz: wpl,
    wt: 2 * w,
    ...radii,
    shearPeak: (4 / 3) * (1 + (outer * inner) / (outer ** 2 + inner ** 2)),
    round: true,
  };
}
