import type { Section } from '../../section.js';

/** Outside diameter and wall, mm: EN 10219-2 and EN 10210-2, from memory. */
const STEEL = [
  [21.3, 2],
  [26.9, 2],
  [33.7, 2.6],
  [42.4, 2.6],
  [48.3, 3.2],
  [60.3, 3.2],
  [76.1, 3.2],
  [88.9, 4],
  [114.3, 4],
] as const;
/** Outside diameter and wall, mm: dealers' lists, common practice, no source. */
const ALUMINIUM = [
  [8, 1],
  [10, 1],
  [12, 1],
  [15, 1.5],
  [16, 1.5],
  [20, 1.5],
  [20, 2],
  [25, 2],
  [30, 2],
  [40, 2],
  [50, 3],
] as const;
const STEEL_BARS = [6, 8, 10, 12, 16, 20] as const;

const tube = (name: string, diameter: number, wall: number, material: string): Section => ({
  name,
  shape: { kind: 'tube', diameter, wall },
  material,
  measured: null,
});

/** Round tubes and steel bars: CHS-42.4x2.6 (S235, cold-formed), CHS-42.4x2.6-S355 (hot-finished), alu-25x2, steel-10. */
export const TUBE_SECTIONS: readonly Section[] = [
  ...STEEL.map(([d, t]) => tube(`CHS-${d}x${t}`, d, t, 'S235H-cold')),
  ...STEEL.map(([d, t]) => tube(`CHS-${d}x${t}-S355`, d, t, 'S355H-hot')),
  ...ALUMINIUM.map(([d, t]) => tube(`alu-${d}x${t}`, d, t, '6060-T6')),
  ...STEEL_BARS.map(
    (d): Section => ({ name: `steel-${d}`, shape: { kind: 'round', diameter: d }, material: 'S235', measured: null }),
  ),
];
