/** The cross-section of a strut; mm. A rectangle's width lies along its local y, its height along its local z (the roll turns both about x). */
export type SectionShape =
  | { readonly kind: 'round'; readonly diameter: number }
  | { readonly kind: 'tube'; readonly diameter: number; readonly wall: number }
  | {
      readonly kind: 'rectangle';
      readonly width: number;
      readonly height: number;
    };

export interface Section {
  readonly name: string;
  readonly shape: SectionShape;
  /** Name of a material of the catalogue or the job. */
  readonly material: string;
  /** Largest diameter (or sides) measured on the batch, mm; null: nominal. Sockets are bored for it. */
  readonly measured: number | null;
}

/** Area mm², second moments mm⁴ about local y and z, torsion constant mm⁴, polar-free radius of gyration mm. */
export interface SectionProperties {
  readonly area: number;
  readonly iy: number;
  readonly iz: number;
  readonly torsion: number;
  /** Largest distance from the axis to the outline, mm: half the diagonal of a rectangle. */
  readonly circumradius: number;
}

/** Properties in closed form; a rectangle's torsion constant by Roark, Formulas for Stress and Strain, table of torsion, case 4 (from memory): error under 4 %. */
export function sectionProperties(shape: SectionShape): SectionProperties {
  switch (shape.kind) {
    case 'round':
      return ring(shape.diameter, 0);
    case 'tube':
      return ring(shape.diameter, shape.diameter - 2 * shape.wall);
    case 'rectangle': {
      const { width: b, height: h } = shape;
      const [long, short] = b > h ? [b / 2, h / 2] : [h / 2, b / 2];
      const ratio = short / long;
      return {
        area: b * h,
        iy: (b * h ** 3) / 12,
        iz: (h * b ** 3) / 12,
        torsion: long * short ** 3 * (16 / 3 - 3.36 * ratio * (1 - ratio ** 4 / 12)),
        circumradius: Math.hypot(b, h) / 2,
      };
    }
  }
}

function ring(outer: number, inner: number): SectionProperties {
  const second = (Math.PI * (outer ** 4 - inner ** 4)) / 64;
  return {
    area: (Math.PI * (outer ** 2 - inner ** 2)) / 4,
    iy: second,
    iz: second,
    torsion: 2 * second,
    circumradius: outer / 2,
  };
}
