import type { Section } from '../section.js';

/** Diameters that dowels are sold in, mm: common practice, no source. */
const DOWELS = [3, 4, 5, 6, 8, 9, 10, 12, 15, 18, 20, 21, 25, 28, 30, 35, 40] as const;

const dowel = (diameter: number): Section => ({
  name: `beech-${diameter}`,
  shape: { kind: 'round', diameter },
  material: 'beech-dowel',
  measured: null,
});

/** Sections by name. A job adds its own under `sections`. */
export const SECTIONS: ReadonlyMap<string, Section> = new Map(DOWELS.map(dowel).map((s) => [s.name, s]));
