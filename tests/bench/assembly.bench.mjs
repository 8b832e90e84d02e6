// The order of building and the fit-up of double-layer grids (invented), on the compiled program.
import { assess } from '../../dist/pipeline/assess.js';
import { planAssembly } from '../../dist/planning/assembly/plan-assembly.js';
import { planFitUp } from '../../dist/planning/fit-up/plan-fit-up.js';
import { readJob } from '../../dist/readers/job.js';
import { readTruss } from '../../dist/readers/truss.js';

export const title =
  'Order of building, sag at every step, and fit-up: seconds of CPU (order of 2,000 struts < 10, 10,000 samples on 500 struts < 5)';

/** A square-on-square grid of n x n bays of 300 mm on its lower corners; 8 n² - 8 n + 4 struts and a little more. */
export function grid(n) {
  const nodes = [];
  const members = [];
  const upper = (i, j) => `U${i}_${j}`;
  const lower = (i, j) => `L${i}_${j}`;
  const join = (a, b) => members.push({ id: `S${members.length + 1}`, ends: [a, b] });
  for (let i = 0; i <= n; i++)
    for (let j = 0; j <= n; j++) nodes.push({ id: upper(i, j), at: [300 * i, 300 * j, 200] });
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) nodes.push({ id: lower(i, j), at: [300 * i + 150, 300 * j + 150, 0] });
  for (let i = 0; i <= n; i++)
    for (let j = 0; j <= n; j++) {
      if (i < n) join(upper(i, j), upper(i + 1, j));
      if (j < n) join(upper(i, j), upper(i, j + 1));
    }
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) {
      if (i < n - 1) join(lower(i, j), lower(i + 1, j));
      if (j < n - 1) join(lower(i, j), lower(i, j + 1));
      for (const [di, dj] of [
        [0, 0],
        [1, 0],
        [0, 1],
        [1, 1],
      ])
        join(lower(i, j), upper(i + di, j + dj));
    }
  const supports = [lower(0, 0), lower(n - 1, 0), lower(0, n - 1), lower(n - 1, n - 1)].map((node) => ({
    node,
    fixed: 'xyz',
  }));
  return { format: 'strutwright-truss/1', units: 'mm', nodes, members, supports };
}

const cpu = (work) => {
  const before = process.cpuUsage();
  const result = work();
  const { user, system } = process.cpuUsage(before);
  return { result, seconds: (user + system) / 1e6 };
};

export async function run(print) {
  const jobOf = (joints) =>
    readJob(
      `{"format":"strutwright-job/1","title":"grid","truss":"t.json","analysis":{"buckling":false,"joints":"${joints}"}}`,
      'job',
    ).job;
  const job = jobOf('pinned');
  print('struts   assess    order  blocked  props   fit-up (10,000 samples)   order, rigid joints');
  for (const n of [8, 11, 16]) {
    const { truss } = readTruss(JSON.stringify(grid(n)), 'grid');
    const a = cpu(() => assess(truss, job));
    const { topology, parts } = a.result;
    const order = cpu(() => planAssembly(a.result));
    const fit = cpu(() => planFitUp(topology, parts, job));
    const blocked = order.result.plan.closing.length;
    const props = order.result.plan.steps.reduce((sum, s) => sum + s.props.length, 0);
    const stiff = assess(truss, jobOf('rigid'));
    const rigid = cpu(() => planAssembly(stiff));
    print(
      `${String(truss.members.length).padStart(6)} ${a.seconds.toFixed(2).padStart(8)} ${order.seconds.toFixed(2).padStart(8)} ${String(blocked).padStart(8)} ${String(props).padStart(6)} ${fit.seconds.toFixed(2).padStart(8)}   chance ${fit.result?.chance}   ${rigid.seconds.toFixed(2)}`,
    );
  }
}
