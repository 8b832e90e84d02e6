/** A double-layer grid of 2 n² nodes and 8 n² - 8 n + 1 struts, 1000 mm apart, its lower edge held in z and at three corners in the plane. */
export function doubleLayerGrid(n) {
  const nodes = [];
  const ends = [];
  const at = (layer, i, j) => layer * n * n + i * n + j;
  for (let layer = 0; layer < 2; layer++)
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) nodes.push(1000 * (i + layer / 2), 1000 * (j + layer / 2), layer ? 0 : 700);
  for (let layer = 0; layer < 2; layer++)
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) {
        if (i + 1 < n) ends.push(at(layer, i, j), at(layer, i + 1, j));
        if (j + 1 < n) ends.push(at(layer, i, j), at(layer, i, j + 1));
      }
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++)
      for (const [a, b] of [
        [0, 0],
        [1, 0],
        [0, 1],
        [1, 1],
      ])
        if (i + a < n && j + b < n) ends.push(at(1, i, j), at(0, i + a, j + b));
  const fixed = new Uint8Array(6 * n * n);
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) if (i === 0 || j === 0 || i === n - 1 || j === n - 1) fixed[3 * at(1, i, j) + 2] = 1;
  for (const [i, j] of [
    [0, 0],
    [0, n - 1],
    [n - 1, 0],
  ])
    fixed.fill(1, 3 * at(1, i, j), 3 * at(1, i, j) + 2);
  return { nodes: Float64Array.from(nodes), ends: Int32Array.from(ends), fixed };
}

/** The same grid as a frame of round bars, 30 mm of wood, all joints rigid. */
export function asFrame(figure, tools) {
  const { normalise, perpendicular, cross } = tools;
  const members = [];
  for (let e = 0; e < figure.ends.length; e += 2) {
    const [a, b] = [figure.ends[e], figure.ends[e + 1]];
    const d = [0, 1, 2].map((k) => figure.nodes[3 * b + k] - figure.nodes[3 * a + k]);
    const x = normalise(d);
    const y = perpendicular(x);
    const second = 11000 * ((Math.PI * 30 ** 4) / 64);
    const segment = {
      length: Math.hypot(...d),
      axial: 11000 * Math.PI * 15 ** 2,
      bendingY: second,
      bendingZ: second,
      torsion: second / 8,
    };
    members.push({ ends: [a, b], axes: { x, y, z: cross(x, y) }, segments: [segment], springs: [] });
  }
  const fixed = new Uint8Array(2 * figure.fixed.length);
  for (let i = 0; i < figure.fixed.length; i += 3) for (let k = 0; k < 3; k++) fixed[2 * i + k] = figure.fixed[i + k];
  return { nodes: figure.nodes, members, fixed };
}
