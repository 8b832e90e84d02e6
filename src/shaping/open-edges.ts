/**
 * Number of faults of a mesh at its own precision: directed edges that do not occur exactly once with their reverse exactly once,
 * plus triangles with two equal corners. 0: closed and oriented. Vertices count as equal when all three numbers are.
 */
export function openEdges(positions: Float32Array, triangles: Uint32Array): number {
  const weld = weldVertices(positions);
  const n = weld.length + 1;
  const count = triangles.length;
  const forward = new Float64Array(count);
  const reverse = new Float64Array(count);
  let faults = 0;
  for (let t = 0; t < count; t += 3) {
    const [a, b, c] = [weld[triangles[t]!]!, weld[triangles[t + 1]!]!, weld[triangles[t + 2]!]!];
    if (a === b || b === c || c === a) faults++;
    forward.set([a * n + b, b * n + c, c * n + a], t);
    reverse.set([b * n + a, c * n + b, a * n + c], t);
  }
  forward.sort();
  reverse.sort();
  // Two sorted lists of edges: a fault is an edge that occurs twice, or that the other list lacks.
  for (let i = 1; i < count; i++) if (forward[i] === forward[i - 1]) faults++;
  for (let i = 0, j = 0; i < count || j < count; ) {
    if (j >= count || (i < count && forward[i]! < reverse[j]!)) {
      faults++;
      i++;
    } else if (i >= count || forward[i]! > reverse[j]!) {
      faults++;
      j++;
    } else {
      i++;
      j++;
    }
  }
  return faults;
}

/** For each vertex the first one with the same three numbers; a table with open addressing over the bits. */
function weldVertices(positions: Float32Array): Uint32Array {
  // Adding nought makes the two noughts of floating point one.
  const clean = positions.map((v) => v + 0);
  const bits = new Int32Array(clean.buffer);
  const count = positions.length / 3;
  let size = 1;
  while (size < 2 * count) size *= 2;
  const table = new Int32Array(size).fill(-1);
  const weld = new Uint32Array(count);
  for (let i = 0; i < count; i++) {
    const [x, y, z] = [bits[3 * i]!, bits[3 * i + 1]!, bits[3 * i + 2]!];
    let h = Math.imul(x, 0x9e3779b1) ^ Math.imul(y, 0x85ebca6b) ^ Math.imul(z, 0xc2b2ae35);
    h = (h ^ (h >>> 15)) & (size - 1);
    for (let at = table[h]!; at >= 0; at = table[h]!) {
      if (bits[3 * at] === x && bits[3 * at + 1] === y && bits[3 * at + 2] === z) break;
      h = (h + 1) & (size - 1);
    }
    if (table[h]! < 0) table[h] = i;
    weld[i] = table[h]!;
  }
  return weld;
}
