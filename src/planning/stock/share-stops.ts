import { ROUND_OFF } from '../../model/tolerance.js';

/** A strut whose cut length may move by `give` either way; mm. */
export interface StopCandidate {
  readonly mark: string;
  readonly length: number;
  readonly give: number;
}

/** A strut's length at the stop that it shares; misfit = setting - its own length, mm. */
export interface SharedStop {
  readonly mark: string;
  readonly setting: number;
  readonly misfit: number;
}

/**
 * Fewest stop settings, then least sum of misfits: min (settings, sum |setting - length|) with |misfit| <= give for every
 * piece and settings on whole steps of the saw. Pieces are taken in order of length and cut into runs, each with one setting
 * (dynamic programming over the runs' ends); the best setting of a run is its median, moved into what all of it allow.
 */
export function shareStops(candidates: readonly StopCandidate[], step: number): SharedStop[] {
  const sorted = candidates.map((c, at) => ({ ...c, at })).sort((a, b) => a.length - b.length || a.at - b.at);
  const n = sorted.length;
  const settings = new Int32Array(n + 1);
  const misfits = new Float64Array(n + 1);
  const from = new Int32Array(n + 1);
  const chosen = new Float64Array(n + 1);
  for (let end = 1; end <= n; end++) {
    settings[end] = n + 1;
    let [low, high] = [-Infinity, Infinity];
    for (let start = end - 1; start >= 0; start--) {
      const c = sorted[start]!;
      low = Math.max(low, c.length - c.give);
      high = Math.min(high, c.length + c.give);
      if (low > high) break;
      const setting = settingIn(sorted, start, end, low, high, step);
      if (setting === undefined) continue;
      let misfit = misfits[start]!;
      for (let i = start; i < end; i++) misfit += Math.abs(setting - sorted[i]!.length);
      const count = settings[start]! + 1;
      if (count < settings[end]! || (count === settings[end] && misfit < misfits[end]!)) {
        settings[end] = count;
        misfits[end] = misfit;
        from[end] = start;
        chosen[end] = setting;
      }
    }
  }
  const shared: SharedStop[] = new Array(n);
  for (let end = n; end > 0; end = from[end]!) {
    for (let i = from[end]!; i < end; i++) {
      const { mark, length, at } = sorted[i]!;
      shared[at] = { mark, setting: chosen[end]!, misfit: chosen[end]! - length };
    }
  }
  return shared;
}

/** The best setting of one run: a length that all of it have, else the step nearest the median within what all allow. */
function settingIn(
  sorted: readonly StopCandidate[],
  start: number,
  end: number,
  low: number,
  high: number,
  step: number,
): number | undefined {
  const median = sorted[(start + end - 1) >> 1]!.length;
  // A length as planned needs no rounding: it is on the saw's step already, or the step is not kept on purpose.
  if (median >= low && median <= high) return median;
  const onStep = (steps: number): number => Math.round(steps * step * 1e6) / 1e6;
  const slack = ROUND_OFF.sawStep.value;
  const setting = median < low ? onStep(Math.ceil((low - slack) / step)) : onStep(Math.floor((high + slack) / step));
  return setting >= low - slack && setting <= high + slack ? setting : undefined;
}
