import { defaultJob } from '../../dist/model/job/index.js';
import { topologyOf } from '../../dist/model/topology.js';
import { mend } from '../../dist/statics/mend/mend.js';
import { complexOf, givenCells } from '../../dist/statics/reciprocal/complex.js';
import { fileDiagram } from '../../dist/statics/reciprocal/file-diagram.js';
import { functionSpace } from '../../dist/statics/reciprocal/function-space.js';
import { reciprocalOf } from '../../dist/statics/reciprocal/reciprocal.js';
import { traceCells } from '../../dist/statics/reciprocal/trace-cells.js';

export const title = 'reciprocal figures: reading, function space, mending, by number of struts';

/**
 * Homothetic shells of a sphere-like polyhedron with plane faces (rings of trapezoids, triangles at the poles), joined
 * corner to corner. Over each face the function is phi(n . x / h), linear between shells, so a diagram exists and is
 * known: its gradients.
 */
function shells(rings, sides, layers) {
  const points = [];
  for (let i = 1; i <= rings; i++) {
    const polar = (Math.PI * i) / (rings + 1);
    for (let k = 0; k < sides; k++) {
      const turn = (2 * Math.PI * k) / sides;
      points.push([Math.sin(polar) * Math.cos(turn), Math.sin(polar) * Math.sin(turn), Math.cos(polar)]);
    }
  }
  const [top, bottom] = [points.length, points.length + 1];
  points.push([0, 0, 1], [0, 0, -1]);
  const faces = [];
  for (let k = 0; k < sides; k++) {
    const l = (k + 1) % sides;
    faces.push([top, k, l]);
    for (let i = 0; i + 1 < rings; i++) {
      faces.push([i * sides + k, (i + 1) * sides + k, (i + 1) * sides + l, i * sides + l]);
    }
    faces.push([bottom, (rings - 1) * sides + l, (rings - 1) * sides + k]);
  }
  const key = (a, b) => `${Math.min(a, b)} ${Math.max(a, b)}`;
  const edges = new Map();
  for (const face of faces) {
    face.forEach((a, i) => {
      const b = face[(i + 1) % face.length];
      edges.set(key(a, b), [Math.min(a, b), Math.max(a, b)]);
    });
  }
  const list = [...edges.values()];
  const edgeIndex = new Map([...edges.keys()].map((k, i) => [k, i]));
  const node = (layer, p) => `N${layer * points.length + p}`;
  const radius = (layer) => 1000 * (1 - layer / (layers + 0.5));
  const truss = { nodes: [], members: [], faces: [], cells: [], supports: [], loads: [], reciprocal: null };
  const blank = { force: null, section: null, area: null, modulus: null, roll: null, group: null };
  const member = (a, b) => truss.members.push({ mark: `S${truss.members.length}`, ends: [a, b], ...blank });
  const face = (mark, nodes) => truss.faces.push({ mark, nodes, panel: false, group: null });
  for (let layer = 0; layer < layers; layer++) {
    for (const [i, p] of points.entries()) {
      truss.nodes.push({ mark: node(layer, i), at: p.map((v) => v * radius(layer)) });
    }
    for (const [a, b] of list) member(node(layer, a), node(layer, b));
    for (const [f, loop] of faces.entries()) {
      face(
        `F${layer}x${f}`,
        loop.map((p) => node(layer, p)),
      );
    }
    if (layer === 0) continue;
    for (const i of points.keys()) member(node(layer - 1, i), node(layer, i));
    for (const [e, [a, b]] of list.entries()) {
      face(`W${layer}x${e}`, [node(layer - 1, a), node(layer - 1, b), node(layer, b), node(layer, a)]);
    }
  }
  const vertices = [
    { cell: 'outside', at: [0, 0, 0] },
    { cell: 'core', at: [0, 0, 0] },
  ];
  const cross = (a, b) => [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
  const minus = (a, b) => a.map((v, k) => v - b[k]);
  for (const [f, loop] of faces.entries()) {
    const [a, b, c] = loop.slice(0, 3).map((p) => points[p]);
    const n = cross(minus(b, a), minus(c, a));
    const h = n[0] * a[0] + n[1] * a[1] + n[2] * a[2];
    for (let layer = 1; layer < layers; layer++) {
      const walls = loop.map((p, i) => `W${layer}x${edgeIndex.get(key(p, loop[(i + 1) % loop.length]))}`);
      const mark = `C${layer}x${f}`;
      truss.cells.push({ mark, faces: [`F${layer - 1}x${f}`, `F${layer}x${f}`, ...walls] });
      // Another slope of phi in each layer.
      vertices.push({ cell: mark, at: n.map((v) => (v / h) * (1 + layer * layer)) });
    }
  }
  truss.cells.push({ mark: 'core', faces: faces.map((_, f) => `F${layers - 1}x${f}`) });
  truss.reciprocal = { newtonPerArea: 1, vertices };
  return truss;
}

function timed(work) {
  const start = performance.now();
  const value = work();
  return { value, time: `${(performance.now() - start).toFixed(0)} ms`.padStart(9) };
}

const round = (x) => Math.round(x * 1000) / 1000;

/** A cube of n³ cells in six tetrahedra each: a function for every inner node, so many of them. */
function tetrahedra(n) {
  const id = (p) => (p[0] * (n + 1) + p[1]) * (n + 1) + p[2];
  const truss = { nodes: [], members: [], faces: [], cells: [], supports: [], loads: [], reciprocal: null };
  const span = [...Array(n + 1).keys()];
  for (const i of span)
    for (const j of span)
      for (const k of span) {
        const bend = [i, j, k].every((v) => v > 0 && v < n) ? 0.2 : 0;
        const at = [i, j, k].map((v, a) => 100 * (v + bend * Math.sin(7 * i + 11 * j + 13 * k + a)));
        truss.nodes.push({ mark: `N${id([i, j, k])}`, at });
      }
  const seen = new Map();
  const once = (list, corners, make) => {
    const key = [...corners].sort((a, b) => a - b).join(' ');
    if (!seen.has(key)) {
      seen.set(key, `M${seen.size}`);
      list.push({ mark: seen.get(key), ...make(corners.map((c) => `N${c}`)) });
    }
    return seen.get(key);
  };
  const blank = { force: null, section: null, area: null, modulus: null, roll: null, group: null };
  const member = (ends) => ({ ends, ...blank });
  const face = (nodes) => ({ nodes, panel: false, group: null });
  for (let c = 0; c < n ** 3; c++)
    for (const order of ['012', '021', '102', '120', '201', '210']) {
      const at = [Math.floor(c / n / n), Math.floor(c / n) % n, c % n];
      const t = [id(at)];
      for (const axis of order) {
        at[axis]++;
        t.push(id(at));
      }
      for (let a = 0; a < 4; a++) for (let b = a + 1; b < 4; b++) once(truss.members, [t[a], t[b]], member);
      const faces = t.map((_, out) =>
        once(
          truss.faces,
          t.filter((_, k) => k !== out),
          face,
        ),
      );
      truss.cells.push({ mark: `C${truss.cells.length}`, faces });
    }
  return truss;
}

export async function run(print) {
  const job = { ...defaultJob(), forces: { ...defaultJob().forces, sign: 1 } };
  print(
    'struts  nodes  faces  cells |  complex     read  relative | trace cells |    space  dim | whole stage |     mend',
  );
  for (const [rings, sides, layers] of [
    [7, 12, 4],
    [11, 16, 5],
    [13, 20, 6],
    [16, 24, 7],
  ]) {
    const truss = shells(rings, sides, layers);
    const topology = topologyOf(truss);
    const built = timed(() => complexOf(topology, givenCells(topology)));
    const { complex, findings } = built.value;
    if (!complex) throw new Error(JSON.stringify(findings.slice(0, 3)));
    const read = timed(() => fileDiagram(topology, job, complex, truss.reciprocal, null));
    const { forces, residuals } = read.value;
    const traced = timed(() => traceCells(topology));
    const space = timed(() => functionSpace(topology, complex));
    const whole = timed(() => reciprocalOf(topology, job));
    const rough = {
      ...truss,
      reciprocal: null,
      nodes: truss.nodes.map((n) => ({ ...n, at: n.at.map(round) })),
      members: truss.members.map((m, i) => ({ ...m, force: forces[i] })),
    };
    const mended = timed(() => mend(rough));
    const counts = [truss.members, truss.nodes, truss.faces, complex.cells].map((l) => String(l.length).padStart(6));
    print(
      `${counts.join(' ')} |${built.time}${read.time}   ${residuals.maxRelative.toExponential(1)} |   ${traced.time} |${space.time} ${String(space.value.dimension).padStart(4)} |   ${whole.time} |${mended.time}${mended.value.done ? '' : ` ${mended.value.findings.map((f) => `${f.code} ${f.value}`)}`}`,
    );
  }
  print('tetrahedra: struts  nodes  faces  cells |    space  dim');
  for (const n of [3, 5, 7]) {
    const truss = tetrahedra(n);
    const topology = topologyOf(truss);
    const { complex } = complexOf(topology, givenCells(topology));
    const space = timed(() => functionSpace(topology, complex));
    const counts = [truss.members, truss.nodes, truss.faces, complex.cells].map((l) => String(l.length).padStart(6));
    print(`            ${counts.join(' ')} |${space.time} ${String(space.value.dimension).padStart(4)}`);
  }
}
