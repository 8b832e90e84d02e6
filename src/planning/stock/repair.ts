import type { Random } from '../../maths/random.js';
import type { Meter } from './effort.js';
import { Exchange } from './exchange.js';
import type { CuttingProblem, Run } from './problem.js';

/** See Exchange.move: enough to pass a few dozen steps of room while a piece's length is being gathered. */
const WARMTH = 0.002;
/** Moves without gain, beside some for each bar, before the search gives up. */
const PATIENCE = 1500;
const PATIENCE_A_BAR = 25;

/** Packs what is left over into bars that are nearly full, by exchange; undefined when the moves end with pieces still over. */
export function repair(
  problem: CuttingProblem,
  runs: readonly Run[],
  over: Int32Array,
  spareBars: readonly number[],
  random: Random,
  meter: Meter,
): Run[] | undefined {
  const exchange = new Exchange(problem, runs, over, spareBars, random, meter);
  if (exchange.bars.length === 0) return undefined;
  const patience = PATIENCE + PATIENCE_A_BAR * exchange.bars.length;
  let highest = exchange.spread;
  for (let idle = 0; exchange.leftWeight > 0; idle++) {
    if (meter.exhausted || idle > patience) return undefined;
    if (exchange.move(WARMTH) || exchange.spread > highest) {
      idle = 0;
      highest = exchange.spread;
    }
  }
  return exchange.runs();
}
