/** Least setback, mm: two struts in line leave this much each, so that a web stands between their stops whatever the gap. */
export const LEAST_SETBACK = 1.5;

/** What the search needs of a node: pairs that need parting, and two answers about each. */
export interface PairRule {
  /** Number of bars. */
  readonly count: number;
  /** Setback that serves both bars of the pair alike. */
  common(i: number, j: number): number;
  /** Least setback of bar i while bar j starts at sj; -Infinity where any will do. */
  least(i: number, j: number, sj: number): number;
}

/**
 * Setbacks of all bars at a node, in their order, mm: each pair apart, and none can be lowered by itself.
 *
 * From the setbacks that are common to each pair, the largest of a bar's pairs, bars are lowered one at a time, the farthest first,
 * until a sweep changes nothing. Moving a bar outwards never brings it nearer to another, so every step stays valid. The search
 * starts from common setbacks on purpose: other minima let one strut run through the node and leave no solid core.
 */
export function leastSetbacks(rule: PairRule): number[] {
  const n = rule.count;
  const setbacks = new Array<number>(n).fill(LEAST_SETBACK);
  for (let i = 0; i < n; i++)
    for (let j = i + 1; j < n; j++) {
      const s = rule.common(i, j);
      setbacks[i] = Math.max(setbacks[i]!, s);
      setbacks[j] = Math.max(setbacks[j]!, s);
    }
  const order = setbacks.map((_, i) => i).sort((a, b) => setbacks[b]! - setbacks[a]! || a - b);
  for (let sweep = 0; sweep < MAX_SWEEPS; sweep++) {
    let gained = 0;
    for (const i of order) {
      let need = LEAST_SETBACK;
      for (let j = 0; j < n; j++) if (j !== i) need = Math.max(need, rule.least(i, j, setbacks[j]!));
      if (need < setbacks[i]!) {
        gained += setbacks[i]! - need;
        setbacks[i] = need;
      }
    }
    if (gained < SETTLED) break;
  }
  return setbacks;
}

/** A second sweep finds what the first freed; more than a few change microns. */
const MAX_SWEEPS = 6;
/** mm; below any printer's step. */
const SETTLED = 1e-3;
