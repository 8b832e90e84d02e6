import { gammaM, kMod } from '../model/catalogue/timber-factors.js';
import type { Material } from '../model/material.js';
import type { MemberActions } from '../model/solution.js';
import type { Rules } from './standard.js';

type Duration = MemberActions['duration'];

/** Share of its short-term strength that a plastic may carry for long: 20 to 30 %, a judgement from memory. */
const SUSTAINED_SHARE = 0.25;

const standing = (duration: Duration): boolean => duration !== 'short' && duration !== 'instantaneous';

/** What a short-term strength of a plastic (or of its glue) may carry, MPa: over the job's factor, and no more than the sustained share where the load stands. */
export const plasticLimit = (strength: number, duration: Duration, rules: Rules): number =>
  standing(duration) ? Math.min(strength / rules.factor, strength * SUSTAINED_SHARE) : strength / rules.factor;

export const isWood = ({ family }: Material): boolean => family === 'timber' || family === 'glulam';

/** Of strengths along the grain, where no class gives those across it: the least ratios of EN 338:2016 (ft,90 / fv 0.4 / 4.0, fc,90 / fc,0 2.5 / 21). */
const [TENSION_ACROSS, COMPRESSION_ACROSS] = [0.1, 0.119] as const;
/** Rolling shear is about twice the tension across the grain: note to EN 1995-1-1 6.1.7, from memory. */
const ROLLING = 2;

/** Design value of wood across the grain, MPa; null: not known. */
function acrossGrain(
  material: Material,
  symbol: 'ft' | 'ftZ' | 'fc' | 'fv',
  duration: Duration,
  rules: Rules,
): number | null {
  const { strength, family } = material;
  const { ft90k, fc90k } = strength;
  const factor =
    strength['fvk'] === undefined
      ? 1 / rules.factor
      : kMod(rules.serviceClass, duration) / gammaM(family as 'timber' | 'glulam');
  if (symbol === 'fc') {
    const along = strength['fc0k'] ?? strength['fc'];
    const across = fc90k ?? (along === undefined ? undefined : COMPRESSION_ACROSS * along);
    return across === undefined ? null : factor * across;
  }
  const shear = strength['fvk'] ?? strength['fv'];
  const pull = ft90k ?? (shear === undefined ? undefined : TENSION_ACROSS * shear);
  if (pull === undefined) return null;
  return factor * (symbol === 'fv' ? Math.min(ROLLING * pull, shear ?? ROLLING * pull) : pull);
}

/** Design value of a timber strength, MPa: the characteristic one by EN 1995-1-1 (2.14), else the ultimate one over the factor; null: not known, or not timber. */
export function woodLimit(
  material: Material,
  symbol: 'fv' | 'ft' | 'fc' | 'fc90',
  duration: Duration,
  rules: Rules,
): number | null {
  if (material.family !== 'timber' && material.family !== 'glulam') return null;
  const characteristic = material.strength[{ fv: 'fvk', ft: 'ft0k', fc: 'fc0k', fc90: 'fc90k' }[symbol]];
  if (characteristic !== undefined)
    return (kMod(rules.serviceClass, duration) * characteristic) / gammaM(material.family);
  const ultimate = material.strength[symbol];
  return ultimate === undefined ? null : ultimate / rules.factor;
}

/**
 * What a hub of a material may carry, MPa; null: not known. Wood across the grain, since its grain runs anyhow to a bore; a print by the plastic's, `ftZ` being tension
 * across its layers, whatever way it is printed.
 */
export function hubLimit(
  hub: Material,
  symbol: 'ft' | 'ftZ' | 'fc' | 'fv',
  duration: Duration,
  rules: Rules,
): number | null {
  if (isWood(hub)) return acrossGrain(hub, symbol, duration, rules);
  const strength = hub.strength[symbol] ?? (symbol === 'ftZ' ? hub.strength['ft'] : undefined);
  return strength === undefined ? null : plasticLimit(strength, duration, rules);
}
