import { jobSchema } from '../../dist/model/job/index.js';
import { assess } from '../../dist/pipeline/assess.js';
import { judge } from '../../dist/strength/judge.js';
import { plateOf } from '../../dist/strength/panel/plate.js';

export const title = 'Strength: members, sockets and panels of a double-layer grid under its combinations';

/** An invented square-on-square grid of n x n bays of 1 m, 0.8 m deep, on its four lower corners; the upper faces are panels. */
function grid(n) {
  const nodes = [];
  const members = [];
  const faces = [];
  const top = (i, j) => `U${i}x${j}`;
  const low = (i, j) => `L${i}x${j}`;
  for (let i = 0; i <= n; i++)
    for (let j = 0; j <= n; j++) nodes.push({ mark: top(i, j), at: [1000 * i, 1000 * j, 800] });
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) nodes.push({ mark: low(i, j), at: [1000 * i + 500, 1000 * j + 500, 0] });
  const bar = (a, b) =>
    members.push({
      mark: `S${members.length}`,
      ends: [a, b],
      force: null,
      section: null,
      area: null,
      modulus: null,
      roll: null,
      group: null,
    });
  for (let i = 0; i <= n; i++)
    for (let j = 0; j <= n; j++) {
      if (i < n) bar(top(i, j), top(i + 1, j));
      if (j < n) bar(top(i, j), top(i, j + 1));
      if (i < n - 1 && j < n) bar(low(i, j), low(i + 1, j));
      if (j < n - 1 && i < n) bar(low(i, j), low(i, j + 1));
      if (i < n && j < n) {
        for (const [a, b] of [
          [i, j],
          [i + 1, j],
          [i, j + 1],
          [i + 1, j + 1],
        ])
          bar(low(i, j), top(a, b));
        faces.push({
          mark: `P${i}x${j}`,
          nodes: [top(i, j), top(i + 1, j), top(i + 1, j + 1), top(i, j + 1)],
          panel: true,
          group: null,
        });
      }
    }
  const corners = [low(0, 0), low(n - 1, 0), low(0, n - 1), low(n - 1, n - 1)];
  const supports = corners.map((node) => ({ node, fixed: { x: true, y: true, z: true } }));
  return { nodes, members, faces, cells: [], reciprocal: null, supports, loads: [] };
}

const job = jobSchema.parse({
  format: 'strutwright-job/1',
  title: 'grid',
  truss: 't.json',
  struts: { section: 'C24-45x45' },
  analysis: { buckling: false },
  panels: { seating: 'over', thickness_mm: 6, fixingCapacity_N: 200 },
  loads: {
    cases: [
      { name: 'snow', kind: 'snow', pressure_kN_per_m2: 0.5 },
      { name: 'wind down', kind: 'wind', pressure_kN_per_m2: 0.3, direction: 'normal' },
      { name: 'wind up', kind: 'wind', pressure_kN_per_m2: -0.5, direction: 'normal' },
      { name: 'people', kind: 'imposed', pressure_kN_per_m2: 0.4 },
    ],
  },
});

const time = (work) => {
  const start = process.cpuUsage();
  const result = work();
  const { user, system } = process.cpuUsage(start);
  return [(user + system) / 1000, result];
};

export async function run(print) {
  print('bays  struts  sockets  panels  combinations  judge ms (cpu)');
  for (const n of [4, 8, 12]) {
    const truss = grid(n);
    const { parts, solution } = assess(truss, job);
    let best = Number.POSITIVE_INFINITY;
    let utilisations = [];
    for (let k = 0; k < 3; k++) {
      const [ms, judged] = time(() => judge(truss, parts, { forces: null, solution }, job));
      best = Math.min(best, ms);
      utilisations = judged.utilisations;
    }
    const count = (kind) => utilisations.filter((u) => u.kind === kind).length;
    print(
      [n, count('strut'), count('socket'), count('panel'), solution.combinations.length, best.toFixed(0)]
        .map((v, i) => String(v).padStart([4, 7, 8, 7, 13, 15][i]))
        .join(' '),
    );
  }
  const square = [
    [0, 0],
    [900, 0],
    [900, 900],
    [0, 900],
  ];
  const [ms] = time(() => {
    for (let k = 0; k < 50; k++) plateOf(square, 0.37).bend({ edges: [0, 1, 2, 3], points: [] });
  });
  print(`one plate of four corners: ${(ms / 50).toFixed(1)} ms`);
}
