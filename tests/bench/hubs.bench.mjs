import { openPool } from '../../dist/machine/pool.js';
import { PIECES } from '../../dist/pipeline/stages/shape-hub-task.js';
import { planBeds } from '../../dist/planning/beds/plan-beds.js';
import { randomHub } from '../shaping/random-hub.mjs';

export const title = 'Printed hubs: 500 random ones with orientation, walls measured, STL and 3MF objects on 2 workers';

export async function run(print) {
  const count = Number(process.env.STRUTWRIGHT_HUBS ?? 500);
  const made = Array.from({ length: count }, (_, i) => randomHub(20261 + i));
  const sockets = made.reduce((sum, m) => sum + m.hub.sockets.length, 0);
  print(`${count} hubs, ${(sockets / count).toFixed(1)} struts each`);
  const inputs = made.map(({ hub, job }, i) => ({
    hub,
    job,
    tension: hub.sockets.map(() => 1),
    object: 1 + i * PIECES,
  }));
  const pool = openPool(new URL('../../dist/pipeline/worker.js', import.meta.url), 2);
  const started = performance.now();
  const pieces = [];
  let [triangles, bytes, objects] = [0, 0, 0];
  let [first, half, most] = [0, 0, 0];
  await pool.each('shape-hub', inputs, (output, index) => {
    if (index === 0) first = performance.now() - started;
    if (index === count >> 1) half = process.memoryUsage().rss;
    most = Math.max(most, process.memoryUsage().rss);
    for (const [k, p] of output.shaped.pieces.entries()) {
      pieces.push({ mark: `N${index}`, piece: p.piece, box: p.box, volume: p.volume, mass: 0 });
      triangles += p.triangles.length / 3;
      bytes += output.stl[k].length;
      objects += output.objects[k].bytes.length;
    }
  });
  const shaped = performance.now() - started;
  await pool.close();
  print(
    `first hub after ${first.toFixed(0)} ms, all in ${(shaped / 1000).toFixed(1)} s, ${(shaped / count).toFixed(0)} ms each`,
  );
  print(`${triangles} triangles, STL ${(bytes / 1e6).toFixed(0)} MB, 3MF objects ${(objects / 1e6).toFixed(0)} MB`);
  print(`resident half-way ${(half / 1e6).toFixed(0)} MB, at most ${(most / 1e6).toFixed(0)} MB`);
  const planning = performance.now();
  const { beds } = planBeds(pieces, made[0].job.printers);
  print(`${beds.length} beds planned in ${(performance.now() - planning).toFixed(0)} ms`);
}
