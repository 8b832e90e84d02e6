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

/** 8 a b² / 3 over a polynomial in b/a: torsion modulus of a rectangle of half sides a >= b, Roark's Formulas for Stress and Strain, 6th ed., table of torsion, case 4 (from memory). */
function rectangleTorsion(a: number, b: number): number {
  const r = b / a;
  return (8 * a * b * b) / 3 / (1 + 0.6095 * r + 0.8865 * r ** 2 - 1.8023 * r ** 3 + 0.91 * r ** 4);
}

/** Elastic and plastic section values in closed form. */
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
      wt: rectangleTorsion(long, short),
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
