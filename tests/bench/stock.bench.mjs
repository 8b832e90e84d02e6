import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { planStock } from '../../dist/planning/stock/plan-stock.js';

export const title = 'Struts on stock';

/** Academic sets are read where they stand beside the project and left out otherwise; truss jobs of the tests always run. */
const SETS = join(import.meta.dirname, '../../../shared/data/stock');
const JOBS = [join(SETS, 'jobs'), join(import.meta.dirname, '../published/stock')];
const ACADEMIC = [
  'falkenauer_u.txt',
  'falkenauer_t.txt',
  'hard28.txt',
  'scholl_1.txt',
  'scholl_2.txt',
  'waescher.txt',
  'schwerin.txt',
  'scholl_3.txt',
];

export async function run(print) {
  print('set                        jobs  optimal  proven   mean s    max s   worst gap to the bound');
  await planStock({ pieces: [{ mark: 'a', length: 1, quantity: 1 }], stock: [{ name: 'b', length: 1 }], kerf: 0 });
  const folder = JOBS.find(existsSync);
  const jobs = readdirSync(folder)
    .filter((f) => f.endsWith('.json'))
    .map((f) => truss(JSON.parse(readFileSync(join(folder, f), 'utf8'))));
  await measure(
    'truss jobs, one stock',
    jobs.filter((j) => j.request.stock.length === 1),
    print,
  );
  await measure(
    'truss jobs, priced stocks',
    jobs.filter((j) => j.request.stock.length > 1),
    print,
  );
  for (const file of ACADEMIC) {
    const path = join(SETS, file);
    if (existsSync(path)) await measure(file, academic(readFileSync(path, 'utf8')), print);
  }
}

async function measure(name, instances, print) {
  let [optimal, proven, total, longest, gap] = [0, 0, 0, 0, 0];
  for (const { request, best } of instances) {
    const start = performance.now();
    const answer = await planStock(request);
    const seconds = (performance.now() - start) / 1000;
    total += seconds;
    longest = Math.max(longest, seconds);
    if (answer.cost <= best + 1e-9) optimal++;
    if (answer.proven) proven++;
    gap = Math.max(gap, answer.cost / answer.lowerBound - 1);
  }
  const n = instances.length;
  const cell = (text, width) => String(text).padStart(width);
  print(
    `${name.padEnd(26)}${cell(n, 5)}${cell(optimal, 9)}${cell(proven, 8)}${cell((total / n).toFixed(2), 9)}${cell(longest.toFixed(2), 9)}${cell(`${(100 * gap).toFixed(2)} %`, 9)}`,
  );
}

const truss = (job) => ({
  best: job.best_known,
  request: {
    pieces: job.parts.map((p, i) => ({ mark: `S${i + 1}`, length: p.length / 10, quantity: p.qty })),
    stock: job.stock.map((s, i) => ({
      name: `B${i + 1}`,
      length: s.length / 10,
      price: s.price,
      available: s.qty ?? undefined,
    })),
    kerf: job.kerf / 10,
  },
});

/** Number of instances, then for each: name, capacity, number of pieces, best known; one weight a line. */
function academic(text) {
  const words = text.trim().split(/\s+/);
  let at = 1;
  return Array.from({ length: Number(words[0]) }, () => {
    const [, capacity, n, best] = [words[at++], ...words.slice(at, (at += 3)).map(Number)];
    const pieces = Array.from({ length: n }, (_, i) => ({ mark: `P${i}`, length: Number(words[at++]), quantity: 1 }));
    return { best, request: { pieces, stock: [{ name: 'bin', length: capacity }], kerf: 0 } };
  });
}
