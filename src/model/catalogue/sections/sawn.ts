import type { Section } from '../../section.js';

/** Planed sizes of construction timber, width x height in mm: common practice, no source. */
const SAWN = [
  [22, 45],
  [34, 45],
  [45, 45],
  [45, 70],
  [45, 95],
  [45, 120],
  [45, 145],
  [70, 70],
  [70, 95],
  [95, 95],
  [120, 120],
  [145, 145],
] as const;
const GLUED = [
  [60, 60],
  [60, 120],
  [80, 80],
  [80, 160],
  [100, 100],
  [120, 120],
  [140, 140],
] as const;
/** Nominal and dressed size in inches: American softwood lumber standard, from memory. */
const DRESSED = [
  ['2x2', 1.5, 1.5],
  ['2x3', 1.5, 2.5],
  ['2x4', 1.5, 3.5],
  ['2x6', 1.5, 5.5],
  ['4x4', 3.5, 3.5],
] as const;
const INCH = 25.4;

const bar = (name: string, width: number, height: number, material: string): Section => ({
  name,
  shape: { kind: 'rectangle', width, height },
  material,
  measured: null,
});

/** Rectangular timber: C24-45x95, GL24h-80x80, DFL-2x4. */
export const SAWN_SECTIONS: readonly Section[] = [
  ...['C16', 'C24', 'D30'].flatMap((grade) => SAWN.map(([b, h]) => bar(`${grade}-${b}x${h}`, b, h, grade))),
  ...['GL24h', 'GL28h'].flatMap((grade) => GLUED.map(([b, h]) => bar(`${grade}-${b}x${h}`, b, h, grade))),
  ...(
    [
      ['DFL', 'DFL-No2'],
      ['HF', 'HF-No2'],
      ['SPF', 'SPF-No2'],
    ] as const
  ).flatMap(([prefix, material]) =>
    DRESSED.map(([size, b, h]) => bar(`${prefix}-${size}`, b * INCH, h * INCH, material)),
  ),
];
