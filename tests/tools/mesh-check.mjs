/**
 * Checks of a binary STL that share no code with the program or its solid kernel: vertices are equal when their three
 * single-precision numbers are the same bits.
 */

/** @param {Uint8Array} bytes */
export function readStl(bytes) {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const count = view.getUint32(80, true);
  if (bytes.byteLength !== 84 + 50 * count) throw new Error('length does not match the count of triangles');
  const corners = new Float32Array(9 * count);
  const normals = new Float32Array(3 * count);
  const ids = new Map();
  const index = new Uint32Array(3 * count);
  for (let t = 0; t < count; t++) {
    const at = 84 + 50 * t;
    for (let k = 0; k < 3; k++) normals[3 * t + k] = view.getFloat32(at + 4 * k, true);
    for (let v = 0; v < 3; v++) {
      const p = at + 12 + 12 * v;
      for (let k = 0; k < 3; k++) corners[9 * t + 3 * v + k] = view.getFloat32(p + 4 * k, true);
      const key = `${view.getUint32(p)},${view.getUint32(p + 4)},${view.getUint32(p + 8)}`;
      let id = ids.get(key);
      if (id === undefined) {
        id = ids.size;
        ids.set(key, id);
      }
      index[3 * t + v] = id;
    }
  }
  return { count, corners, normals, index, vertices: ids.size };
}

/** Faults of closedness and orientation, shells, degenerate triangles, signed volume, and the box. */
export function inspect(stl) {
  const { count, corners, index, vertices } = stl;
  const edges = new Map();
  let degenerate = 0;
  let volume = 0;
  const parent = Array.from({ length: vertices }, (_, i) => i);
  const find = (i) => {
    while (parent[i] !== i) i = parent[i] = parent[parent[i]];
    return i;
  };
  const low = [Infinity, Infinity, Infinity];
  const high = [-Infinity, -Infinity, -Infinity];
  for (let t = 0; t < count; t++) {
    const [a, b, c] = [index[3 * t], index[3 * t + 1], index[3 * t + 2]];
    for (const [u, v] of [
      [a, b],
      [b, c],
      [c, a],
    ]) {
      const key = u * vertices + v;
      edges.set(key, (edges.get(key) ?? 0) + 1);
      parent[find(u)] = find(v);
    }
    const p = corners.subarray(9 * t, 9 * t + 9);
    const e = [p[3] - p[0], p[4] - p[1], p[5] - p[2]];
    const f = [p[6] - p[0], p[7] - p[1], p[8] - p[2]];
    const n = [e[1] * f[2] - e[2] * f[1], e[2] * f[0] - e[0] * f[2], e[0] * f[1] - e[1] * f[0]];
    if (a === b || b === c || c === a || Math.hypot(...n) === 0) degenerate++;
    volume +=
      (p[0] * (p[4] * p[8] - p[5] * p[7]) + p[1] * (p[5] * p[6] - p[3] * p[8]) + p[2] * (p[3] * p[7] - p[4] * p[6])) /
      6;
    for (let k = 0; k < 9; k++) {
      low[k % 3] = Math.min(low[k % 3], p[k]);
      high[k % 3] = Math.max(high[k % 3], p[k]);
    }
  }
  let open = 0;
  for (const [key, times] of edges) {
    const reverse = (key % vertices) * vertices + Math.floor(key / vertices);
    if (times !== 1 || edges.get(reverse) !== 1) open++;
  }
  const roots = new Set();
  for (let i = 0; i < vertices; i++) roots.add(find(i));
  return { open, degenerate, volume, shells: roots.size, low, high, edges: edges.size };
}

/** Cells of triangles over the plane square to z, for upright rays. */
export function makeProbe(stl) {
  const { corners, count } = stl;
  const low = [Infinity, Infinity];
  const high = [-Infinity, -Infinity];
  for (let i = 0; i < corners.length; i += 3)
    for (let k = 0; k < 2; k++) {
      low[k] = Math.min(low[k], corners[i + k]);
      high[k] = Math.max(high[k], corners[i + k]);
    }
  const n = 64;
  const size = [(high[0] - low[0]) / n || 1, (high[1] - low[1]) / n || 1];
  const cells = Array.from({ length: n * n }, () => []);
  const cellOf = (v, k) => Math.max(0, Math.min(n - 1, Math.floor((v - low[k]) / size[k])));
  for (let t = 0; t < count; t++) {
    const xs = [0, 3, 6].map((k) => corners[9 * t + k]);
    const ys = [1, 4, 7].map((k) => corners[9 * t + k]);
    for (let i = cellOf(Math.min(...xs), 0); i <= cellOf(Math.max(...xs), 0); i++)
      for (let j = cellOf(Math.min(...ys), 1); j <= cellOf(Math.max(...ys), 1); j++) cells[i * n + j].push(t);
  }
  /** Whether a point lies in the solid: crossings of an upright ray, by their sense; a hair's shift avoids edges. */
  return (point) => {
    const [x, y, z] = [point[0] + 1.234e-5, point[1] + 2.718e-5, point[2]];
    if (x < low[0] || x > high[0] || y < low[1] || y > high[1]) return false;
    let winding = 0;
    for (const t of cells[cellOf(x, 0) * n + cellOf(y, 1)]) {
      const p = corners.subarray(9 * t, 9 * t + 9);
      const side = (i, j) => (p[j] - p[i]) * (y - p[i + 1]) - (p[j + 1] - p[i + 1]) * (x - p[i]);
      const [a, b, c] = [side(0, 3), side(3, 6), side(6, 0)];
      if (!((a > 0 && b > 0 && c > 0) || (a < 0 && b < 0 && c < 0))) continue;
      const at = (p[2] * b + p[5] * c + p[8] * a) / (a + b + c);
      if (at > z) winding += a > 0 ? 1 : -1;
    }
    return winding !== 0;
  };
}

/** Number of pairs of triangles that cross: an edge of one pierces the inside of another that shares no corner with it. */
export function crossings(stl) {
  const { count, corners, index } = stl;
  const low = [Infinity, Infinity, Infinity];
  const high = [-Infinity, -Infinity, -Infinity];
  for (let i = 0; i < corners.length; i++) {
    low[i % 3] = Math.min(low[i % 3], corners[i]);
    high[i % 3] = Math.max(high[i % 3], corners[i]);
  }
  const n = 40;
  const size = [0, 1, 2].map((k) => (high[k] - low[k]) / n || 1);
  const cell = (v, k) => Math.max(0, Math.min(n - 1, Math.floor((v - low[k]) / size[k])));
  const grid = new Map();
  const rangeOf = (points) =>
    [0, 1, 2].map((k) => {
      const values = points.map((p) => p[k]);
      return [cell(Math.min(...values), k), cell(Math.max(...values), k)];
    });
  const at = (t, v) => corners.subarray(9 * t + 3 * v, 9 * t + 3 * v + 3);
  const each = (range, visit) => {
    for (let i = range[0][0]; i <= range[0][1]; i++)
      for (let j = range[1][0]; j <= range[1][1]; j++)
        for (let k = range[2][0]; k <= range[2][1]; k++) visit((i * n + j) * n + k);
  };
  for (let t = 0; t < count; t++)
    each(rangeOf([at(t, 0), at(t, 1), at(t, 2)]), (key) => {
      const list = grid.get(key);
      if (list) list.push(t);
      else grid.set(key, [t]);
    });
  const det = (a, b, c, d) => {
    const [x, y, z] = [0, 1, 2].map((k) => [a[k] - d[k], b[k] - d[k], c[k] - d[k]]);
    return x[0] * (y[1] * z[2] - y[2] * z[1]) - x[1] * (y[0] * z[2] - y[2] * z[0]) + x[2] * (y[0] * z[1] - y[1] * z[0]);
  };
  let found = 0;
  for (let t = 0; t < count; t++)
    for (let v = 0; v < 3; v++) {
      const [i, j] = [index[3 * t + v], index[3 * t + ((v + 1) % 3)]];
      if (i > j) continue;
      const [p, q] = [at(t, v), at(t, (v + 1) % 3)];
      const seen = new Set();
      each(rangeOf([p, q]), (key) => {
        for (const s of grid.get(key) ?? []) {
          if (seen.has(s)) continue;
          seen.add(s);
          const ids = index.subarray(3 * s, 3 * s + 3);
          if (ids.includes(i) || ids.includes(j)) continue;
          const [a, b, c] = [at(s, 0), at(s, 1), at(s, 2)];
          const extent = Math.max(...size);
          const eps = 1e-9 * extent ** 3;
          const [dp, dq] = [det(a, b, c, p), det(a, b, c, q)];
          if (Math.abs(dp) < eps || Math.abs(dq) < eps || dp > 0 === dq > 0) continue;
          const [u, w, x] = [det(p, q, a, b), det(p, q, b, c), det(p, q, c, a)];
          if ((u > eps && w > eps && x > eps) || (u < -eps && w < -eps && x < -eps)) found++;
        }
      });
    }
  return found;
}
