import { type CuttingProblem, patternKey, patternLoad, patternOf, type Run } from './problem.js';

/**
 * Moves pieces from bars that do not exist (kinds past the problem's own) to bars that do, longest first: into the room
 * left on bars in the plan, then onto bars not used yet. What stays on the others cannot be cut without more stock.
 */
export function recover(problem: CuttingProblem, runs: readonly Run[]): readonly Run[] {
  const real = problem.bins.length;
  if (runs.every((r) => r.pattern.bin < real)) return runs;
  const missing = new Int32Array(problem.weights.length);
  const free = problem.bins.map((b) => b.available);
  const bars: { bin: number; room: number; counts: Int32Array }[] = [];
  for (const { pattern, times } of runs) {
    for (let t = 0; t < times; t++) {
      const counts = new Int32Array(problem.weights.length);
      pattern.items.forEach((item, j) => {
        counts[item] = pattern.counts[j]!;
        if (pattern.bin >= real) missing[item]! += pattern.counts[j]!;
      });
      if (pattern.bin < real) {
        const room = problem.bins[pattern.bin]!.capacity - patternLoad(problem.weights, pattern);
        bars.push({ bin: pattern.bin, room, counts });
        free[pattern.bin]!--;
      }
    }
  }
  const small = problem.bins.map((_, b) => b).sort((a, b) => problem.bins[a]!.capacity - problem.bins[b]!.capacity);
  for (let i = 0; i < missing.length; i++) {
    const weight = problem.weights[i]!;
    while (missing[i]! > 0) {
      let bar = bars.filter((b) => b.room >= weight).sort((a, b) => a.room - b.room)[0];
      if (!bar) {
        const bin = small.find((b) => free[b]! > 0 && problem.bins[b]!.capacity >= weight);
        if (bin === undefined) break;
        free[bin]!--;
        bar = { bin, room: problem.bins[bin]!.capacity, counts: new Int32Array(missing.length) };
        bars.push(bar);
      }
      bar.room -= weight;
      bar.counts[i]!++;
      missing[i]!--;
    }
  }
  const out: Run[] = bars.map((b) => ({ pattern: patternOf(b.bin, b.counts), times: 1 }));
  if (missing.some((n) => n > 0)) out.push({ pattern: patternOf(real, missing), times: 1 });
  return merge(out);
}

/** Equal patterns as one run. */
export function merge(runs: readonly Run[]): Run[] {
  const byKey = new Map<string, Run>();
  for (const run of runs) {
    const key = patternKey(run.pattern);
    const seen = byKey.get(key);
    byKey.set(key, seen ? { pattern: seen.pattern, times: seen.times + run.times } : run);
  }
  return [...byKey.values()];
}
