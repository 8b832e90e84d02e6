// Panels on sheets and on strips. Strips and jigsaws are read from ../shared/data/nesting where that stands beside the
// repository (ESICUP, CC0), else from tests/published/nesting.
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const title = 'Nesting: published strips and jigsaws, 300 panels on sheets';

const HERE = fileURLToPath(new URL('.', import.meta.url));
const DIST = new URL('../../dist/', import.meta.url);
/** Best densities printed and what a plan of a minute should reach, % (see the README of the published data). */
const STRIPS = [
  ['trousers', 92.62, 90.5],
  ['dagli', 90.17, 87.5],
  ['marques', 92.02, 89.5],
  ['fu', 92.41, 91],
  ['jakobs1', 89.26, 89],
  ['swim', 79.83, 73.5],
  ['shapes1', 76.73, 72.5],
  ['dighe1', 100, 99.9],
];
/** Seconds for two workers; NEST_SECONDS=5,60 for the whole table. */
const SECONDS = (process.env.NEST_SECONDS ?? '5').split(',').map(Number);
/** NEST_STRIPS=fu,swim for some of the strips, or none. */
const CHOSEN = process.env.NEST_STRIPS?.split(',');

export async function run(print) {
  const { nestPanels: nest } = await import(new URL('index.js', DIST));
  const { openPool } = await import(new URL('machine/pool.js', DIST));
  const pool = openPool(new URL('pipeline/worker.js', DIST), 2);
  const nestPanels = (request) => nest(request, { each: pool.each });
  const { seededRandom } = await import(new URL('maths/random.js', DIST));
  const data = [join(HERE, '../../../shared/data/nesting'), join(HERE, '../../../../shared/data/nesting')].find((p) =>
    existsSync(p),
  );
  const published = JSON.parse(readFileSync(join(HERE, '../published/nesting/strip-instances.json'), 'utf8'));
  print('strip        best  wanted  reached   CPU s  s, two workers');
  for (const [name, best, wanted] of STRIPS) {
    const strip = data ? JSON.parse(readFileSync(join(data, 'strip', `${name}.json`), 'utf8')) : published[name];
    if (!strip || (CHOSEN && !CHOSEN.includes(name))) continue;
    for (const limit of SECONDS) {
      const before = process.cpuUsage().user;
      const density = await densityOf(nestPanels, strip, limit);
      const seconds = (process.cpuUsage().user - before) / 1e6;
      print(
        `${name.padEnd(10)} ${best.toFixed(2).padStart(6)}  ${wanted.toFixed(1).padStart(6)}  ${density.toFixed(2).padStart(7)}  ${seconds.toFixed(1).padStart(6)}  ${limit}`,
      );
    }
  }
  for (const set of ['JP1-TB', 'JP1-TI', 'JP1-TA']) {
    if (!data) break;
    const { instances } = JSON.parse(readFileSync(join(data, 'bin-jigsaw', `${set}.json`), 'utf8'));
    let closed = 0;
    const before = process.cpuUsage().user;
    for (const i of instances.slice(0, 8)) {
      const answer = await nestPanels({
        panels: i.pieces.map((outline, k) => ({ mark: `P${k}`, outline, quantity: 1, rotations: [0] })),
        sheets: [{ name: 'S', width: i.bin[0], height: i.bin[1] }],
        spacing: 0,
        margin: 0,
      });
      if (answer.sheets.length === i.optimalBins) closed++;
    }
    print(
      `${set}: ${closed} of 8 at the known optimum, ${((process.cpuUsage().user - before) / 8e6).toFixed(1)} s each`,
    );
  }
  const random = seededRandom(7);
  const panels = Array.from({ length: 300 }, (_, k) => {
    const n = 3 + Math.floor(random() * 4);
    const r = 60 + random() * 120;
    return {
      mark: `P${k + 1}`,
      quantity: 1,
      rotations: [0, 90, 180, 270],
      outline: Array.from({ length: n }, (_, i) => {
        const a = ((i + 0.6 * random()) / n) * 2 * Math.PI;
        return [r * Math.cos(a), r * Math.sin(a)];
      }),
    };
  });
  const before = process.cpuUsage().user;
  const start = performance.now();
  const answer = await nestPanels({
    panels,
    sheets: [{ name: 'S', width: 1220, height: 2440 }],
    spacing: 2,
    margin: 5,
  });
  print(
    `300 invented panels, 4 rotations, spacing 2: ${answer.sheets.length} sheets, lower bound ${answer.lowerBound}, ${((performance.now() - start) / 1e3).toFixed(1)} s with two workers (wanted < 10), ${((process.cpuUsage().user - before) / 1e6).toFixed(1)} CPU s`,
  );
  await pool.close();
}

async function densityOf(nestPanels, strip, seconds) {
  const area = strip.items.reduce((sum, i) => sum + i.quantity * i.area, 0);
  const panels = strip.items.map((i) => ({
    mark: `P${i.id}`,
    outline: i.polygon,
    quantity: i.quantity,
    rotations: i.rotations,
  }));
  const answer = await nestPanels({
    panels,
    sheets: [{ name: 'strip', width: (2 * area) / strip.stripWidth, height: strip.stripWidth }],
    spacing: 0,
    margin: 0,
    // More than the time allows: the clock ends it.
    effort: 1e4,
    timeLimitMs: 1000 * seconds,
  });
  let used = 0;
  for (const p of answer.sheets[0].placements) {
    const [c, s] = [Math.cos((p.rotation_deg * Math.PI) / 180), Math.sin((p.rotation_deg * Math.PI) / 180)];
    for (const [x, y] of panels.find((q) => q.mark === p.mark).outline) used = Math.max(used, c * x - s * y + p.x);
  }
  return (100 * area) / (strip.stripWidth * used);
}
