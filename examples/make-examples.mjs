// Makes the examples: node examples/make-examples.mjs
//
// Both are invented for this program; nothing of the kind has been built or measured.
//
// lantern: two convex polyhedra with parallel faces, one inside the other, joined corner to corner. Every face between
//   them is plane because an outer edge and its inner edge are both parallel to the line in which the two faces'
//   planes would meet. The function w = (h - n.x) / (h - h') on the frustum over a face (outward normal n, outer and
//   inner plane at h and h'), 0 outside and 1 inside, is piecewise linear and continuous, so its gradients are the
//   vertices of a reciprocal figure (Maxwell 1864; Rankine 1864) and the areas of the reciprocal's faces are the forces.
// canopy: a double-layer grid on four supports under a load at every upper node; its forces are those of equal bars
//   (stiffness method), so they balance to round-off.
import { mkdirSync, writeFileSync } from 'node:fs';
import { Matrix, solve } from 'ml-matrix';

const add = (a, b, s = 1) => a.map((v, i) => v + s * b[i]);
const dot = (a, b) => a.reduce((sum, v, i) => sum + v * b[i], 0);
const cross = (a, b) => [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
const norm = (a) => Math.hypot(...a);
const unit = (a) => a.map((v) => v / norm(a));
const round = (v, digits = 6) => Number(v.toFixed(digits)) + 0;

/** The corner where three planes n.x = h meet (Cramer's rule). */
function corner([n1, n2, n3], [h1, h2, h3]) {
  const det = dot(n1, cross(n2, n3));
  return add(
    add(
      cross(n2, n3).map((v) => v * h1),
      cross(n3, n1),
      h2,
    ),
    cross(n1, n2),
    h3,
  ).map((v) => v / det);
}

/** Corners of a simple polyhedron { x : n.x <= h } as [plane triple], the same for outer and inner. */
function cornersOf(normals, heights) {
  const found = [];
  for (let i = 0; i < normals.length; i++)
    for (let j = i + 1; j < normals.length; j++)
      for (let k = j + 1; k < normals.length; k++) {
        const three = [normals[i], normals[j], normals[k]];
        if (Math.abs(dot(three[0], cross(three[1], three[2]))) < 1e-6) continue;
        const at = corner(three, [heights[i], heights[j], heights[k]]);
        if (normals.every((n, f) => dot(n, at) <= heights[f] + 1e-9)) found.push({ planes: [i, j, k], at });
      }
  return found;
}

/** Loop of the corners on one plane, anticlockwise seen from outside. */
function loopOf(face, corners, normal) {
  const on = corners.map((c, index) => ({ ...c, index })).filter((c) => c.planes.includes(face));
  const middle = on.reduce((sum, c) => add(sum, c.at, 1 / on.length), [0, 0, 0]);
  const x = unit(add(on[0].at, middle, -1));
  const y = cross(normal, x);
  const turn = (c) => Math.atan2(dot(add(c.at, middle, -1), y), dot(add(c.at, middle, -1), x));
  return on.sort((a, b) => turn(a) - turn(b)).map((c) => c.index);
}

// Direction (azimuth, elevation in degrees), distance of the outer face and of the inner face in mm.
// A flat bottom to stand on, twelve faces in all, none alike; found by trying, for struts long enough to be made.
export const LANTERN_FACES = [
  [0, -90, 205, 105],
  [199, -51, 228, 124],
  [7, -30, 233, 139],
  [137, -41, 294, 167],
  [256, -16, 178, 104],
  [33, -7, 195, 108],
  [190, 43, 195, 98],
  [15, 13, 234, 124],
  [77, 70, 164, 101],
  [205, 68, 186, 94],
  [50, 63, 176, 104],
  [160, 85, 153, 84],
];

export function lantern(faces = LANTERN_FACES) {
  const rad = Math.PI / 180;
  const normals = faces.map(([a, e]) => [
    Math.cos(e * rad) * Math.cos(a * rad),
    Math.cos(e * rad) * Math.sin(a * rad),
    Math.sin(e * rad),
  ]);
  const outer = cornersOf(
    normals,
    faces.map((f) => f[2]),
  );
  const inner = cornersOf(
    normals,
    faces.map((f) => f[3]),
  );
  const sameShape = outer.length === inner.length && outer.every((c, i) => c.planes.join() === inner[i].planes.join());
  if (!sameShape) throw new Error('the inner and the outer polyhedron differ in their corners');
  const lift = faces[0][2];
  const raise = (p) => [round(p[0]), round(p[1]), round(p[2] + lift)];
  const name = (letter, i) => `${letter}${String(i + 1).padStart(2, '0')}`;
  const nodes = [
    ...outer.map((c, i) => ({ id: name('A', i), at: raise(c.at) })),
    ...inner.map((c, i) => ({ id: name('B', i), at: raise(c.at) })),
  ];
  const gradient = faces.map((f, i) => normals[i].map((v) => -v / (f[2] - f[3])));
  const zero = [0, 0, 0];
  const members = [];
  const sides = [];
  const edges = [];
  outer.forEach((a, i) => {
    outer.forEach((b, j) => {
      const shared = a.planes.filter((p) => b.planes.includes(p));
      if (i < j && shared.length === 2) edges.push({ i, j, shared });
    });
  });
  // Cells round an edge, anticlockwise about i -> j, give the force polygon; its signed area is the force.
  const force = (from, to, cells) => {
    const e = unit(add(to, from, -1));
    const middle = add(from, to).map((v) => v / 2);
    const ordered = order(cells, middle, e);
    let area = 0;
    ordered.forEach((c, k) => {
      area += 0.5 * dot(cross(c.a, ordered[(k + 1) % ordered.length].a), e);
    });
    return area;
  };
  const order = (cells, middle, e) => {
    const x = unit(cross(Math.abs(e[2]) < 0.9 ? [0, 0, 1] : [1, 0, 0], e));
    const y = cross(e, x);
    const turn = (c) => Math.atan2(dot(add(c.at, middle, -1), y), dot(add(c.at, middle, -1), x));
    return [...cells].sort((p, q) => turn(p) - turn(q));
  };
  const centre = (points) => points.reduce((s, p) => add(s, p, 1 / points.length), zero);
  const frustum = (f) => {
    const own = outer.map((c, i) => [c, inner[i]]).filter(([c]) => c.planes.includes(f));
    return { at: centre(own.flatMap(([p, q]) => [p.at, q.at])), a: gradient[f] };
  };
  const middleOfAll = centre(inner.map((c) => c.at));
  for (const { i, j, shared } of edges) {
    const beyond = add(centre([outer[i].at, outer[j].at]), middleOfAll, -1).map((v, k) => middleOfAll[k] + 2 * v);
    members.push({
      ends: [name('A', i), name('A', j)],
      group: 'outer',
      raw: force(outer[i].at, outer[j].at, [...shared.map(frustum), { at: beyond, a: zero }]),
    });
    sides.push([name('A', i), name('A', j), name('B', j), name('B', i)]);
  }
  for (const { i, j, shared } of edges)
    members.push({
      ends: [name('B', i), name('B', j)],
      group: 'inner',
      raw: force(inner[i].at, inner[j].at, [...shared.map(frustum), { at: middleOfAll, a: zero }]),
    });
  outer.forEach((c, i) => {
    members.push({
      ends: [name('A', i), name('B', i)],
      group: 'spoke',
      raw: force(c.at, inner[i].at, c.planes.map(frustum)),
    });
  });
  const largest = Math.max(...members.map((m) => Math.abs(m.raw)));
  const LARGEST_N = 40;
  const reciprocalSize = 3500; // mm of diagram for one unit of gradient (1/mm), so that the diagram is drawn in hundreds of mm
  const faceList = [
    ...faces.map((_, f) => ({
      id: name('F', f),
      nodes: loopOf(f, outer, normals[f]).map((k) => name('A', k)),
      panel: f !== 0 && f % 2 === 1,
      group: 'outer',
    })),
    ...faces.map((_, f) => ({
      id: name('G', f),
      nodes: loopOf(f, inner, normals[f]).map((k) => name('B', k)),
      group: 'inner',
    })),
    ...sides.map((loop, k) => ({ id: name('H', k), nodes: loop, group: 'side' })),
  ];
  const cells = [
    ...faces.map((_, f) => ({
      id: name('C', f),
      faces: [name('F', f), name('G', f), ...edges.flatMap((e, k) => (e.shared.includes(f) ? [name('H', k)] : []))],
    })),
    { id: 'core', faces: faces.map((_, f) => name('G', f)) },
    { id: 'outside', faces: faces.map((_, f) => name('F', f)) },
  ];
  return {
    format: 'strutwright-truss/1',
    units: 'mm',
    nodes,
    // Outer struts pull, inner struts and spokes push: the sign of a self-stress is free.
    members: members.map((m, k) => ({
      id: name('S', k),
      ends: m.ends,
      force: round((-m.raw / largest) * LARGEST_N),
      group: m.group,
    })),
    faces: faceList,
    cells,
    reciprocal: {
      newtonPerArea: LARGEST_N / largest / reciprocalSize ** 2,
      vertices: [
        ...gradient.map((a, f) => ({ cell: name('C', f), at: a.map((v) => round(v * reciprocalSize, 9)) })),
        { cell: 'core', at: zero },
        { cell: 'outside', at: zero },
      ],
    },
  };
}

export function canopy() {
  const [bayX, bayY, depth, pitch] = [260, 260, 190, 0.08];
  const upper = (i, j) => `U${i + 1}${j + 1}`;
  const lower = (i, j) => `L${i + 1}${j + 1}`;
  const nodes = [];
  for (let i = 0; i < 4; i++)
    for (let j = 0; j < 3; j++)
      nodes.push({ id: upper(i, j), at: [i * bayX, j * bayY, round(depth + 60 + i * bayX * pitch)] });
  for (let i = 0; i < 3; i++)
    for (let j = 0; j < 2; j++)
      nodes.push({ id: lower(i, j), at: [(i + 0.5) * bayX, (j + 0.5) * bayY, round(60 + (i + 0.5) * bayX * pitch)] });
  const at = Object.fromEntries(nodes.map((n) => [n.id, n.at]));
  const ends = [];
  for (let i = 0; i < 4; i++)
    for (let j = 0; j < 3; j++) {
      if (i < 3) ends.push([upper(i, j), upper(i + 1, j), 'upper']);
      if (j < 2) ends.push([upper(i, j), upper(i, j + 1), 'upper']);
    }
  for (let i = 0; i < 3; i++)
    for (let j = 0; j < 2; j++) {
      if (i < 2) ends.push([lower(i, j), lower(i + 1, j), 'lower']);
      if (j < 1) ends.push([lower(i, j), lower(i, j + 1), 'lower']);
      for (const [di, dj] of [
        [0, 0],
        [1, 0],
        [0, 1],
        [1, 1],
      ])
        ends.push([lower(i, j), upper(i + di, j + dj), 'web']);
    }
  const supports = [lower(0, 0), lower(2, 0), lower(0, 1), lower(2, 1)].map((node) => ({ node, fixed: 'xyz' }));
  const loads = [];
  for (let i = 0; i < 4; i++)
    for (let j = 0; j < 3; j++) {
      const share = (i === 0 || i === 3 ? 0.5 : 1) * (j === 0 || j === 2 ? 0.5 : 1);
      loads.push({ case: 'given', node: upper(i, j), force: [0, 0, -24 * share] });
    }
  const forces = equalBars(nodes, at, ends, supports, loads);
  const faces = [];
  for (let i = 0; i < 3; i++)
    for (let j = 0; j < 2; j++)
      faces.push({
        id: `P${i + 1}${j + 1}`,
        nodes: [upper(i, j), upper(i + 1, j), upper(i + 1, j + 1), upper(i, j + 1)],
        panel: true,
        group: 'roof',
      });
  return {
    format: 'strutwright-truss/1',
    units: 'mm',
    nodes,
    members: ends.map(([a, b, group], k) => ({
      id: `S${String(k + 1).padStart(2, '0')}`,
      ends: [a, b],
      force: round(forces[k]),
      group,
    })),
    faces,
    supports,
    loads,
  };
}

/** Forces of bars of one EA under loads on supports, by direct stiffness. */
function equalBars(nodes, at, ends, supports, loads) {
  const held = new Set(supports.map((s) => s.node));
  const free = nodes.filter((n) => !held.has(n.id)).map((n) => n.id);
  const dof = new Map(free.map((id, i) => [id, 3 * i]));
  const k = Matrix.zeros(3 * free.length, 3 * free.length);
  const f = Matrix.zeros(3 * free.length, 1);
  const bars = ends.map(([a, b]) => {
    const d = add(at[b], at[a], -1);
    return { a, b, length: norm(d), e: unit(d) };
  });
  for (const bar of bars)
    for (const [p, sp] of [
      [bar.a, -1],
      [bar.b, 1],
    ])
      for (const [q, sq] of [
        [bar.a, -1],
        [bar.b, 1],
      ]) {
        if (!dof.has(p) || !dof.has(q)) continue;
        for (let r = 0; r < 3; r++)
          for (let c = 0; c < 3; c++) {
            const [row, column] = [dof.get(p) + r, dof.get(q) + c];
            k.set(row, column, k.get(row, column) + (sp * sq * bar.e[r] * bar.e[c]) / bar.length);
          }
      }
  for (const load of loads)
    if (dof.has(load.node)) for (const r of [0, 1, 2]) f.set(dof.get(load.node) + r, 0, load.force[r]);
  const u = solve(k, f);
  const moved = (id) => (dof.has(id) ? [0, 1, 2].map((r) => u.get(dof.get(id) + r, 0)) : [0, 0, 0]);
  return bars.map((bar) => dot(add(moved(bar.b), moved(bar.a), -1), bar.e) / bar.length);
}

/** One record a line, so that a change shows in a comparison of the files. */
function write(truss) {
  const list = (items) => `[\n${items.map((item) => `    ${JSON.stringify(item)}`).join(',\n')}\n  ]`;
  const parts = Object.entries(truss).map(([key, value]) =>
    key === 'reciprocal'
      ? `  "reciprocal": { "newtonPerArea": ${value.newtonPerArea}, "vertices": ${list(value.vertices)} }`
      : `  ${JSON.stringify(key)}: ${Array.isArray(value) ? list(value) : JSON.stringify(value)}`,
  );
  return `{\n${parts.join(',\n')}\n}\n`;
}

function save(name, truss) {
  const folder = new URL(`./${name}/`, import.meta.url);
  mkdirSync(folder, { recursive: true });
  writeFileSync(new URL('truss.json', folder), write(truss));
}

if (process.argv[1] && import.meta.url.endsWith(process.argv[1].split('/').pop())) {
  save('lantern', lantern());
  save('canopy', canopy());
}
