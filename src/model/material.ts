/** Where a value comes from, printed beside results that rest on it. */
export interface Source {
  /** Standard or handbook with edition; "common practice, no source" for a habit of the trade. */
  readonly text: string;
  /** seen: read in that source; memory: from memory; practice: a habit; user: the job's own value. */
  readonly mark: 'seen' | 'memory' | 'practice' | 'user';
  /** Unverified values give a note wherever a check rests on them. */
  readonly verified: boolean;
}

export type MaterialFamily =
  | 'timber'
  | 'glulam'
  | 'steel'
  | 'aluminium'
  | 'plastic-print'
  | 'acrylic'
  | 'board'
  | 'plastic-sheet';

/** A material; stresses and moduli in MPa, density kg/m³, expansion 1/K, softening °C. Absent values are unknown, never zero. */
export interface Material {
  readonly name: string;
  /** In plain words, for papers. */
  readonly title: string;
  readonly family: MaterialFamily;
  readonly density: number;
  readonly modulus: number;
  /** 5 % fractile of the modulus parallel to the grain (EN 338). */
  readonly modulus05?: number;
  readonly modulus90?: number;
  readonly shearModulus?: number;
  readonly poisson?: number;
  readonly expansion?: number;
  readonly softening?: number;
  /** Characteristic density, kg/m³ (EN 338). */
  readonly densityK?: number;
  /** Strengths by the symbol of their standard without the comma: fmk ft0k fc0k fc90k fvk ft90k (timber), fy fu (steel), fo fu (aluminium), Fb Ft Fc Fv FcPerp Emin (NDS), ft fc fv fm (ultimate), ftZ (across printed layers), sustained (may stand for years). */
  readonly strength: Readonly<Record<string, number>>;
  /** EN 1999-1-1 buckling class, EN 1993-1-1 curve, and the like. */
  readonly buckling?: string;
  /** Hazards that cannot be waived: on a laser, in a fire. */
  readonly hazards?: readonly ('laser-chlorine' | 'laser-fire')[];
  readonly source: Source;
  /** Values whose source differs from `source`, by the name of the field or the symbol of the strength. */
  readonly sources?: Readonly<Record<string, Source>>;
  /** Thickest wall that the strengths hold for, mm. */
  readonly thickest?: number;
}

/** Where one value of a material comes from. */
export const sourceOf = (material: Material, value: string): Source => material.sources?.[value] ?? material.source;

/** Whether every strength of the material is verified: read in its source, or tested by the user. */
export const isVerified = (material: Material): boolean =>
  Object.keys(material.strength).every((symbol) => sourceOf(material, symbol).verified);

/** Whether a strength of the material comes from the user's own test. */
export const isTested = (material: Material): boolean =>
  Object.keys(material.strength).some((symbol) => {
    const { mark, verified } = sourceOf(material, symbol);
    return mark === 'user' && verified;
  });
