import type { Section } from '../../section.js';

/** Diameters that dowels are sold in, mm: common practice, no source. */
const METRIC = [3, 4, 5, 6, 8, 9, 10, 12, 15, 18, 20, 21, 25, 28, 30, 35, 40] as const;
/** Diameters in sixteenths of an inch, sold in lengths of 36 and 48 in: seen in dealers' lists. */
const SIXTEENTHS = [4, 5, 6, 7, 8, 10, 12, 14, 16] as const;

/** 25.4 mm an inch, kept whole so that 3/8 in is 9.525 and not a binary neighbour. */
const mm = (sixteenths: number): number => (sixteenths * 254) / 160;

const dowel = (name: string, diameter: number, material: string): Section => ({
  name,
  shape: { kind: 'round', diameter },
  material,
  measured: null,
});

/** "3/8in", "1in": the fraction in lowest terms, as the trade writes it. */
function inches(sixteenths: number): string {
  let [top, bottom] = [sixteenths, 16];
  while (top % 2 === 0 && bottom > 1) [top, bottom] = [top / 2, bottom / 2];
  return bottom === 1 ? `${top}in` : `${top}/${bottom}in`;
}

const WOODS = [
  ['beech', 'beech-dowel'],
  ['ramin', 'ramin-dowel'],
  ['pine', 'pine-dowel'],
] as const;

/** Round dowels: beech-8, pine-12, birch-3/8in. */
export const DOWEL_SECTIONS: readonly Section[] = [
  ...WOODS.flatMap(([wood, material]) => METRIC.map((d) => dowel(`${wood}-${d}`, d, material))),
  ...SIXTEENTHS.map((s) => dowel(`birch-${inches(s)}`, mm(s), 'birch-dowel')),
];
