/** Random hubs over the compiled program, and their checks by code that shares nothing with the solid kernel. Names and numbers are invented. */
import { detailHubs, weighHubs } from '../../dist/detailing/hubs.js';
import { writeStl } from '../../dist/documents/formats/stl.js';
import { seededRandom } from '../../dist/maths/random.js';
import { jobSchema } from '../../dist/model/job/index.js';
import { topologyOf } from '../../dist/model/topology.js';
import { shapeHub } from '../../dist/shaping/shape-hub.js';
import { crossings, inspect, makeProbe, readStl } from '../tools/mesh-check.mjs';

const round = (diameter) => ({
  name: `r${diameter}`,
  shape: { kind: 'round', diameter },
  material: 'beech-dowel',
  measured: null,
});
const lath = (width, height) => ({
  name: `${width}x${height}`,
  shape: { kind: 'rectangle', width, height },
  material: 'beech-dowel',
  measured: null,
});
const tube = (diameter, wall) => ({
  name: `t${diameter}`,
  shape: { kind: 'tube', diameter, wall },
  material: 'beech-dowel',
  measured: null,
});
const SECTIONS = [round(4), round(6), round(8), round(8), round(10), round(12), lath(8, 14), lath(10, 10), lath(20, 6)];

/** For hubs of spigots: tubes, sawn timber and a dowel among them. */
const SPIGOT_SECTIONS = [tube(16, 2), tube(12, 1.5), tube(20, 1), lath(8, 14), lath(20, 12), round(8)];

const unit = (v) => {
  const l = Math.hypot(...v);
  return v.map((x) => x / l);
};
const angle = (a, b) => Math.acos(Math.max(-1, Math.min(1, a[0] * b[0] + a[1] * b[1] + a[2] * b[2])));

/** A star of 3 to 14 struts, angles down to the limit, one pair in four nearly opposite; its job and its middle hub. */
export function randomHub(seed, special = {}) {
  const random = seededRandom(seed);
  const count = special.count ?? 3 + Math.floor(random() * 12);
  const least = (special.least ?? 12.5 + 25 * random() ** 2) * (Math.PI / 180);
  const system = special.system ?? (random() < 0.08 ? 'spigot' : random() < 0.08 ? 'foot' : 'socket');
  const directions = [];
  for (let tries = 0; directions.length < count && tries < 5000; tries++) {
    let d = [random() * 2 - 1, random() * 2 - 1, random() * 2 - 1];
    if (Math.hypot(...d) > 1 || Math.hypot(...d) < 0.1) continue;
    d = unit(d);
    if (directions.length > 0 && random() < 0.25) {
      const other = directions[Math.floor(random() * directions.length)];
      d = unit(other.map((x, k) => -x + 0.02 * d[k]));
    }
    if (system === 'foot') d[2] = Math.abs(d[2]);
    if (directions.every((o) => angle(o, d) > least)) directions.push(d);
  }
  const job = jobSchema.parse({
    format: 'strutwright-job/1',
    title: 'random',
    truss: 'truss.json',
    nodes: {
      process: ['filament', 'powder', 'resin'][Math.floor(random() * 3)],
      joint: random() < 0.3 ? 'pinned' : 'glued',
      systems: { [`N${seed % 1000}`]: system },
      setbacks: random() < 0.2 ? 'equal-at-node' : 'least',
      ...special.nodes,
    },
  });
  const at = [100, -50, 30];
  const pool = system === 'spigot' ? SPIGOT_SECTIONS : system === 'drilled-ball' ? [round(8), round(6)] : SECTIONS;
  const kinds = Array.from({ length: 1 + Math.floor(random() * 3) }, () => pool[Math.floor(random() * pool.length)]);
  const truss = {
    nodes: [
      { mark: `N${seed % 1000}`, at },
      ...directions.map((d, i) => ({ mark: `M${i + 10}`, at: at.map((x, k) => x + 900 * d[k]) })),
    ],
    members: directions.map((_, i) => ({
      mark: `S${i * 7 + 3}`,
      ends: [`N${seed % 1000}`, `M${i + 10}`],
      force: null,
      section: null,
      area: null,
      modulus: null,
      roll: null,
      group: null,
    })),
    faces: [],
    cells: [],
    reciprocal: null,
    supports: [],
    loads: [],
  };
  const topology = topologyOf(truss);
  const axes = directions.map((x) => {
    const p = Math.abs(x[0]) < 0.6 ? [1, 0, 0] : [0, 1, 0];
    const q = unit([x[1] * p[2] - x[2] * p[1], x[2] * p[0] - x[0] * p[2], x[0] * p[1] - x[1] * p[0]]);
    const r = [x[1] * q[2] - x[2] * q[1], x[2] * q[0] - x[0] * q[2], x[0] * q[1] - x[1] * q[0]];
    const turn = random() * Math.PI;
    const y = q.map((v, k) => v * Math.cos(turn) + r[k] * Math.sin(turn));
    return { x, y, z: [x[1] * y[2] - x[2] * y[1], x[2] * y[0] - x[0] * y[2], x[0] * y[1] - x[1] * y[0]] };
  });
  const sections = directions.map(() => kinds[Math.floor(random() * kinds.length)]);
  const details = special.details ?? [];
  const withDetails = {
    ...job,
    struts: {
      ...job.struts,
      ends: Object.fromEntries(details.map((d, i) => [`S${i * 7 + 3}@N${seed % 1000}`, d])),
    },
  };
  const { hubs } = detailHubs(topology, withDetails, sections, axes);
  return { job, hub: weighHubs(topology, withDetails, hubs.slice(0, 1))[0] };
}

/** Shapes a hub and returns its measures, and in words what is wrong with it. */
export async function checkHub({ job, hub }, { cross = false, samples = 24 } = {}) {
  const faults = [];
  const shaped = await shapeHub(hub, job);
  const piece = shaped.pieces[0];
  if (!piece) return { faults: [`no solid: ${shaped.findings.map((f) => f.code).join(' ')}`], shaped };
  const bytes = writeStl(piece.positions, piece.triangles, hub.mark);
  const stl = readStl(bytes);
  const seen = inspect(stl);
  if (seen.open > 0) faults.push(`${seen.open} open edges`);
  if (seen.shells !== 1) faults.push(`${seen.shells} shells`);
  if (seen.degenerate > 0) faults.push(`${seen.degenerate} degenerate triangles`);
  if (!(seen.volume > 0)) faults.push('inside out');
  if (seen.low[2] !== 0) faults.push(`lowest point ${seen.low[2]}`);
  const closedForm = (hub.mass * 1e9) / hub.material.density;
  const volume = shaped.pieces.reduce((sum, p) => sum + p.volume, 0);
  if (Math.abs(closedForm / volume - 1) > 0.1) faults.push(`mass: ${closedForm} against ${volume} mm3`);
  for (const other of shaped.pieces.slice(1)) {
    const found = inspect(readStl(writeStl(other.positions, other.triangles, other.piece)));
    if (found.open > 0 || found.shells !== 1 || found.degenerate > 0 || found.low[2] !== 0)
      faults.push(`${other.piece}: ${JSON.stringify(found)}`);
  }
  if (cross) {
    const found = crossings(stl);
    if (found > 0) faults.push(`${found} crossings`);
  }
  // Points of the truss's axes go back into the print's by the transpose of the placement.
  const m = piece.placement;
  const intoPrint = (p) => {
    const q = [p[0] + hub.at[0] - m[3], p[1] + hub.at[1] - m[7], p[2] + hub.at[2] - m[11]];
    return [0, 1, 2].map((k) => m[k] * q[0] + m[4 + k] * q[1] + m[8 + k] * q[2]);
  };
  const solid = makeProbe(stl);
  const random = seededRandom(99);
  for (const s of hub.sockets) {
    const isRound = typeof s.bore === 'number';
    const spot = (a, b, t) => intoPrint([0, 1, 2].map((k) => s.direction[k] * t + s.y[k] * a + s.z[k] * b));
    if (s.form === 'spigot' || s.form === 'plate') {
      faults.push(...spigotFaults(s, spot, solid, random, samples));
      continue;
    }
    let [full, hollow] = [0, 0];
    for (let i = 0; i < samples; i++) {
      const phi = 2 * Math.PI * random();
      const t = s.setback + 0.02 + random() * (s.depth + 3);
      const share = 0.995 * Math.sqrt(random());
      const [a, b] = isRound
        ? [(s.bore / 2) * share * Math.cos(phi), (s.bore / 2) * share * Math.sin(phi)]
        : [(s.bore[0] / 2) * 0.995 * (2 * random() - 1), (s.bore[1] / 2) * 0.995 * (2 * random() - 1)];
      if (solid(spot(a, b, t))) full++;
      // Half a wall outside the bore, beyond vent and pin, short of the chamfer.
      const tw = s.setback + 0.35 * s.depth + random() * (s.pin > 0 ? 0.01 : 0.5) * s.depth;
      const w = s.wall / 2;
      const wall = isRound
        ? [(s.bore / 2 + w) * Math.cos(phi), (s.bore / 2 + w) * Math.sin(phi)]
        : [s.bore[0] / 2 + w, (s.bore[1] / 2) * (2 * random() - 1)];
      const p = [0, 1, 2].map((k) => s.direction[k] * tw + s.y[k] * wall[0] + s.z[k] * wall[1]);
      const inOther = hub.sockets.some((o) => o !== s && inPath(o, p));
      if (!inOther && s.pin === 0 && s.detail !== 'drop-in' && !solid(spot(wall[0], wall[1], tw))) hollow++;
    }
    if (full > 0) faults.push(`bore of ${s.strut} is blocked at ${full} of ${samples} points`);
    if (hollow > samples / 8) faults.push(`wall of ${s.strut} is missing at ${hollow} of ${samples} points`);
  }
  return { faults, shaped, bytes, volume, closedForm, triangles: stl.count };
}

/** A spigot is solid to its end, under its letters and beside its holes; round it the strut's own room is empty. */
function spigotFaults(s, spot, solid, random, samples) {
  const faults = [];
  let [missing, inTheWay] = [0, 0];
  const { shape } = s.section;
  for (let i = 0; i < samples; i++) {
    const phi = 2 * Math.PI * random();
    const t = s.setback + 0.3 + random() * (s.depth - 1.5);
    const isRound = typeof s.bore === 'number';
    // Letters are at most half a millimetre deep: a round core is looked at under them, a plate in its middle half.
    const thin = s.bore[0] < s.bore[1] ? 0 : 1;
    const across = (share, k) => s.bore[k] * share * (random() - 0.5);
    const core = isRound
      ? [(s.bore / 2 - 0.8) * Math.cos(phi), (s.bore / 2 - 0.8) * Math.sin(phi)]
      : [across(thin === 0 ? 0.5 : 0.9, 0), across(thin === 1 ? 0.5 : 0.9, 1)];
    if (!inHole(s, t, core[1 - thin]) && !solid(spot(core[0], core[1], t))) missing++;
    const strut = isRound
      ? [0.5, 0.99].map((share) => {
          const r = s.bore / 2 + share * (shape.diameter / 2 - s.bore / 2) + 0.02;
          return [r * Math.cos(phi), r * Math.sin(phi)];
        })
      : [
          [s.bore[0] / 2 + 0.5, 0],
          [-s.bore[0] / 2 - 0.5, s.bore[1] * 0.4],
        ].map(([a, b]) => (s.bore[0] < s.bore[1] ? [a, b] : [s.bore[0] * 0.4, s.bore[1] / 2 + 0.5]));
    for (const [a, b] of strut) if (solid(spot(a, b, t))) inTheWay++;
  }
  if (missing > 0) faults.push(`spigot of ${s.strut} is missing at ${missing} of ${samples} points`);
  if (inTheWay > 0) faults.push(`strut ${s.strut} meets plastic at ${inTheWay} points`);
  return faults;
}

/** Within half a millimetre of a bolt's hole, or of a place where a pin may go, at a distance along the strut and across the plate. */
function inHole(s, t, across) {
  const along = t - s.setback;
  if (s.bolted)
    return Array.from({ length: s.bolted.bolts }, (_, k) => s.bolted.endDistance + k * s.bolted.spacing).some(
      (at) => Math.hypot(along - at, across) < s.bolted.diameter / 2 + 0.75,
    );
  return s.pin > 0 && [0.5, 0.6, 0.7].some((at) => Math.abs(along - at * s.depth) < s.pin / 2 + 0.5);
}

function inPath(o, p) {
  const t = p[0] * o.direction[0] + p[1] * o.direction[1] + p[2] * o.direction[2];
  const a = p[0] * o.y[0] + p[1] * o.y[1] + p[2] * o.y[2];
  const b = p[0] * o.z[0] + p[1] * o.z[1] + p[2] * o.z[2];
  if (t < o.setback - 0.1) return false;
  return typeof o.bore === 'number'
    ? Math.hypot(a, b) < o.bore / 2 + 0.7
    : Math.abs(a) < o.bore[0] / 2 + 0.7 && Math.abs(b) < o.bore[1] / 2 + 0.7;
}
