import { check, readJob, readTruss } from '../../dist/index.js';
import { doubleLayerGrid } from './double-layer-grid.mjs';

export const title = 'check: a double-layer grid with five cases, combinations and buckling (CPU ms)';

/** Invented: a table model of round dowels with self-weight, imposed load, snow, wind and a warm day. */
function jobOf(n) {
  const figure = doubleLayerGrid(n);
  const nodes = [];
  for (let i = 0; i < figure.nodes.length / 3; i++)
    nodes.push({ id: `N${i}`, at: [0, 1, 2].map((k) => figure.nodes[3 * i + k] / 2) });
  const members = [];
  for (let e = 0; e < figure.ends.length; e += 2)
    members.push({ id: `S${e / 2}`, ends: [`N${figure.ends[e]}`, `N${figure.ends[e + 1]}`] });
  const supports = nodes.flatMap((node, i) => {
    const fixed = ['x', 'y', 'z'].filter((_, k) => figure.fixed[3 * i + k]).join('');
    return fixed ? [{ node: node.id, fixed }] : [];
  });
  const top = (force_N) => nodes.slice(0, n * n).map((node) => ({ node: node.id, force_N }));
  const truss = { format: 'strutwright-truss/1', units: 'mm', nodes, members, supports };
  const job = {
    format: 'strutwright-job/1',
    title: 'Grid',
    truss: 'truss.json',
    struts: { section: 'beech-12' },
    loads: {
      cases: [
        { name: 'people', kind: 'imposed', nodes: top([0, 0, -20]) },
        { name: 'snow', kind: 'snow', nodes: top([0, 0, -10]) },
        { name: 'wind', kind: 'wind', nodes: top([3, 0, 8]) },
        { name: 'warm day', kind: 'temperature', temperature_K: 20 },
      ],
    },
  };
  return {
    truss: readTruss(JSON.stringify(truss), 'truss.json').truss,
    job: readJob(JSON.stringify(job), 'job.json').job,
    struts: members.length,
  };
}

export async function run(print) {
  print('| struts | cases | check | lowest load factor with design stiffness | findings |');
  print('|---|---|---|---|---|');
  // 9 bays make 577 struts: five cases and buckling are to take less than 3,000 ms.
  for (const n of [5, 9, 25]) {
    const { truss, job, struts } = jobOf(n);
    const before = process.cpuUsage();
    const report = await check(truss, job);
    const spent = process.cpuUsage(before);
    const cases = Object.keys(report.members[0].force_N).length;
    const low = report.findings.filter((f) => f.code === 'buckling-low' || f.code === 'second-order');
    print(
      `| ${struts} | ${cases} | ${((spent.user + spent.system) / 1000).toFixed(0)} | ${low[0]?.value?.toFixed(3) ?? 'none'} | ${report.findings.length} |`,
    );
  }
}
