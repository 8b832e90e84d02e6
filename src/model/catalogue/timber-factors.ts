import type { MaterialFamily } from '../material.js';

/** Load duration classes, EN 1995-1-1 3.1.2. */
export type Duration = 'permanent' | 'long' | 'medium' | 'short' | 'instantaneous';
/** Service classes, EN 1995-1-1 2.3.1.3: heated inside, sheltered, weather. */
export type ServiceClass = 1 | 2 | 3;

type ByDuration = Readonly<Record<Duration, number>>;
const byDuration = (
  permanent: number,
  long: number,
  medium: number,
  short: number,
  instantaneous: number,
): ByDuration => ({
  permanent,
  long,
  medium,
  short,
  instantaneous,
});

const DRY = byDuration(0.6, 0.7, 0.8, 0.9, 1.1);
/** EN 1995-1-1 table 3.1, solid timber and glulam: seen in an open handbook. */
const K_MOD: Readonly<Record<ServiceClass, ByDuration>> = { 1: DRY, 2: DRY, 3: byDuration(0.5, 0.55, 0.65, 0.7, 0.9) };

/** kmod of solid timber, glulam and plywood (EN 1995-1-1 table 3.1); plywood's row is from memory and equal. */
export const kMod = (serviceClass: ServiceClass, duration: Duration): number => K_MOD[serviceClass][duration];

/** gammaM, EN 1995-1-1 table 2.3: seen in an open handbook. Solid timber where the family has no row. */
export function gammaM(family: MaterialFamily): number {
  if (family === 'glulam') return 1.25;
  if (family === 'board') return 1.2;
  return 1.3;
}
/** gammaM of connections, EN 1995-1-1 table 2.3: seen in an open handbook. */
export const GAMMA_M_CONNECTION = 1.3;

const K_DEF: Readonly<Record<ServiceClass, number>> = { 1: 0.6, 2: 0.8, 3: 2 };
const K_DEF_BOARD: Readonly<Record<ServiceClass, number>> = { 1: 0.8, 2: 1, 3: 2.5 };
/** kdef, EN 1995-1-1 table 3.2: solid timber and glulam seen in an open handbook, plywood from memory; 0 for what does not creep by this rule. */
export function kDef(family: MaterialFamily, serviceClass: ServiceClass): number {
  if (family === 'timber' || family === 'glulam') return K_DEF[serviceClass];
  return family === 'board' ? K_DEF_BOARD[serviceClass] : 0;
}
