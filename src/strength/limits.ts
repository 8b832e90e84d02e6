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
 * What a hub of a material may carry, MPa; null: not known. Wood by its own rule; a print by the plastic's, `ftZ` being tension
 * across its layers, whatever way it is printed.
 */
export function hubLimit(
  hub: Material,
  symbol: 'ft' | 'ftZ' | 'fc' | 'fv',
  duration: Duration,
  rules: Rules,
): number | null {
  if (hub.family === 'timber' || hub.family === 'glulam')
    return woodLimit(hub, symbol === 'ftZ' ? 'ft' : symbol, duration, rules);
  const strength = hub.strength[symbol] ?? (symbol === 'ftZ' ? hub.strength['ft'] : undefined);
  return strength === undefined ? null : plasticLimit(strength, duration, rules);
}
