/**
 * The word of `known` nearest to `word` by edit distance, whatever the case; null where none is near.
 * Near: at most one edit for every three letters of the longer of the two, at least one edit allowed, one letter kept.
 * Of equally near words the first in `known` wins, so the answer does not depend on anything but the order given.
 */
export function nearest(word: string, known: Iterable<string>): string | null {
  const wanted = word.toLowerCase();
  let best: string | null = null;
  let bestDistance = Number.POSITIVE_INFINITY;
  for (const candidate of known) {
    const limit = Math.max(1, Math.floor(Math.max(wanted.length, candidate.length) / 3));
    if (Math.abs(candidate.length - wanted.length) > Math.min(limit, bestDistance - 1)) continue;
    const d = editDistance(wanted, candidate.toLowerCase());
    if (d <= limit && d < bestDistance && d < wanted.length) [best, bestDistance] = [candidate, d];
  }
  return best;
}

/**
 * Least number of insertions, deletions, substitutions and swaps of neighbours that turn a into b, no substring edited
 * twice (optimal string alignment: Damerau, A technique for computer detection and correction of spelling errors,
 * Comm. ACM 7(3), 1964; Wagner and Fischer, J. ACM 21(1), 1974, for the table). O(|a| |b|) steps, three rows kept.
 */
export function editDistance(a: string, b: string): number {
  let [before, last] = [new Array<number>(b.length + 1).fill(0), Array.from({ length: b.length + 1 }, (_, j) => j)];
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const substitution = last[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      let d = Math.min(last[j]! + 1, row[j - 1]! + 1, substitution);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) d = Math.min(d, before[j - 2]! + 1);
      row.push(d);
    }
    [before, last] = [last, row];
  }
  return last[b.length]!;
}
