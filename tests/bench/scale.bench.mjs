// The whole pack of double-layer grids of growing size: processor seconds a stage, peak memory, growth exponents between sizes.
// SCALE=1000 or SCALE=10000 (struts) goes farther than the usual 100 and 300; each size runs in a process of its own.
// SAMPLE=25 shapes every 25th hub alone and counts it for the others, which its neighbour's solid stands in for: each hub is shaped
// by itself, so their time is theirs times their number, and all other stages see a whole pack.
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

export const title = 'Growth with the number of struts: whole pack, 2 workers, processor seconds of all threads';

const SIZES = [100, 300, 1000, 3000, 10_000];
const SELF = fileURLToPath(import.meta.url);

export async function run(print) {
  const most = Number(process.env.SCALE ?? 300);
  const results = [];
  for (const size of SIZES.filter((s) => s <= most)) {
    const child = spawnSync(process.execPath, [SELF, String(size)], {
      encoding: 'utf8',
      maxBuffer: 1e8,
      stdio: ['ignore', 'pipe', process.env.TRACE ? 'inherit' : 'pipe'],
    });
    if (child.status !== 0) {
      print(`${size} struts: ended with status ${child.status}: ${child.stderr?.split('\n').at(-2) ?? ''}`);
      break;
    }
    results.push(JSON.parse(child.stdout));
  }
  const stages = [...new Set(results.flatMap((r) => Object.keys(r.seconds)))];
  print(`${'struts'.padEnd(22)}${results.map((r) => String(r.struts).padStart(10)).join('')}   exponent`);
  for (const stage of stages) {
    const values = results.map((r) => r.seconds[stage] ?? 0);
    print(
      `${`${stage}, s`.padEnd(22)}${values.map((v) => v.toFixed(2).padStart(10)).join('')}   ${exponent(results, values)}`,
    );
  }
  print(`${'waited, s'.padEnd(22)}${results.map((r) => r.wall.toFixed(0).padStart(10)).join('')}`);
  const memory = results.map((r) => r.peak_MB);
  print(
    `${'peak memory, MB'.padEnd(22)}${memory.map((v) => v.toFixed(0).padStart(10)).join('')}   ${exponent(results, memory)}`,
  );
}

/** Slope between the two largest sizes on logarithmic axes. */
function exponent(results, values) {
  const [a, b] = [values.at(-2), values.at(-1)];
  if (!a || !b || a < 0.05) return '';
  return (Math.log(b / a) / Math.log(results.at(-1).struts / results.at(-2).struts)).toFixed(2);
}

/** Square-on-square double-layer grid, bay 200 mm, depth 140 mm, at least `least` struts, held at its lower corners. */
function gridOf(least) {
  let n = 2;
  while (8 * n * n < least) n++;
  const nodes = [];
  const members = [];
  const strut = (a, b) => members.push({ mark: `S${members.length + 1}`, ends: [a, b] });
  const upper = (i, j) => `U${i * (n + 1) + j + 1}`;
  const lower = (i, j) => `L${i * n + j + 1}`;
  for (let i = 0; i <= n; i++)
    for (let j = 0; j <= n; j++) nodes.push({ mark: upper(i, j), at: [200 * i, 200 * j, 140] });
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) nodes.push({ mark: lower(i, j), at: [200 * i + 100, 200 * j + 100, 0] });
  const faces = [];
  for (let i = 0; i <= n; i++)
    for (let j = 0; j <= n; j++) {
      if (i < n) strut(upper(i, j), upper(i + 1, j));
      if (j < n) strut(upper(i, j), upper(i, j + 1));
      if (i === n || j === n) continue;
      for (const [p, q] of [
        [0, 0],
        [1, 0],
        [1, 1],
        [0, 1],
      ])
        strut(lower(i, j), upper(i + p, j + q));
      if (i + 1 < n) strut(lower(i, j), lower(i + 1, j));
      if (j + 1 < n) strut(lower(i, j), lower(i, j + 1));
      // A panel in every fourth bay.
      if ((i + 2 * j) % 4 === 0)
        faces.push({
          mark: `P${faces.length + 1}`,
          nodes: [upper(i, j), upper(i + 1, j), upper(i + 1, j + 1), upper(i, j + 1)],
          panel: true,
          group: null,
        });
    }
  const fixed = { x: true, y: true, z: true };
  return {
    nodes,
    members: members.map((m) => ({
      ...m,
      force: null,
      section: null,
      area: null,
      modulus: null,
      roll: null,
      group: null,
    })),
    faces,
    cells: [],
    reciprocal: null,
    supports: [lower(0, 0), lower(n - 1, 0), lower(0, n - 1), lower(n - 1, n - 1)].map((node) => ({ node, fixed })),
    loads: nodes.filter((m) => m.mark.startsWith('U')).map((m) => ({ case: 'use', node: m.mark, force: [0, 0, -2] })),
  };
}

if (process.argv[1] === SELF && process.argv[2]) {
  const { makePack } = await import('../../dist/pipeline/make.js');
  const { openPool } = await import('../../dist/machine/pool.js');
  const { defaultJob } = await import('../../dist/model/job/index.js');
  const truss = gridOf(Number(process.argv[2]));
  const pool = openPool(new URL('../../dist/pipeline/worker.js', import.meta.url), 2);
  const seconds = {};
  const sample = Math.max(1, Number(process.env.SAMPLE ?? 1));
  const spent = () => {
    const { user, system } = process.cpuUsage();
    return (user + system) / 1e6;
  };
  let [stage, since] = ['Start', spent()];
  const begun = performance.now();
  const turn = (next) => {
    const now = spent();
    seconds[stage] = (seconds[stage] ?? 0) + (now - since) * (stage === 'Hubs' ? sample : 1);
    if (process.env.TRACE) process.stderr.write(`${truss.members.length} ${stage} ${seconds[stage].toFixed(2)} s\n`);
    [stage, since] = [next, now];
  };
  /** Every `sample`th is done, and its output taken for those after it. */
  const each = async (task, inputs, take) => {
    const done = inputs.filter((_, i) => i % sample === 0);
    await pool.each(task, done, async (output, k) => {
      const few = Math.min(sample, inputs.length - k * sample);
      for (let i = 0; i < few; i++) await take(i === few - 1 ? output : structuredClone(output), k * sample + i);
    });
  };
  const job = { ...defaultJob('Grid'), forces: { ...defaultJob('Grid').forces, source: 'analysis' } };
  await makePack(truss, job, {
    write: () => {},
    each,
    tell: ({ stage: next }) => {
      if (next !== stage) turn(next);
    },
  });
  turn('end');
  seconds.whole = Object.values(seconds).reduce((sum, s) => sum + s, 0);
  const wall = (performance.now() - begun) / 1000;
  await pool.close();
  process.stdout.write(
    JSON.stringify({ struts: truss.members.length, seconds, wall, peak_MB: process.resourceUsage().maxRSS / 1024 }),
  );
}
