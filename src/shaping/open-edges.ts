/**
 * Number of faults of a mesh at its own precision: directed edges that do not occur exactly once with their reverse exactly once,
 * plus triangles with two equal corners. 0: closed and oriented. Vertices count as equal when all three numbers are.
 */
export function openEdges(positions: Float32Array, triangles: Uint32Array): number {
  const ids = new Map<string, number>();
  const weld = new Uint32Array(positions.length / 3);
  for (let i = 0; i < weld.length; i++) {
    const key = `${positions[3 * i]} ${positions[3 * i + 1]} ${positions[3 * i + 2]}`;
    let id = ids.get(key);
    if (id === undefined) ids.set(key, (id = ids.size));
    weld[i] = id;
  }
  const n = ids.size;
  const seen = new Map<number, number>();
  let faults = 0;
  for (let t = 0; t < triangles.length; t += 3) {
    const [a, b, c] = [weld[triangles[t]!]!, weld[triangles[t + 1]!]!, weld[triangles[t + 2]!]!];
    if (a === b || b === c || c === a) faults++;
    for (const key of [a * n + b, b * n + c, c * n + a]) seen.set(key, (seen.get(key) ?? 0) + 1);
  }
  for (const [key, times] of seen) {
    const reverse = (key % n) * n + Math.floor(key / n);
    if (times !== 1 || seen.get(reverse) !== 1) faults++;
  }
  return faults;
}
