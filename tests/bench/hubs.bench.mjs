import { writeStl } from '../../dist/documents/formats/stl.js';
import { packObject } from '../../dist/documents/formats/three-mf.js';
import { bedFile } from '../../dist/documents/nodes/bed-file.js';
import { bedPicture } from '../../dist/documents/nodes/bed-picture.js';
import { pieceIcon } from '../../dist/documents/nodes/piece-pictures.js';
import { deflateBlocks } from '../../dist/machine/deflate.js';
import { openPool } from '../../dist/machine/pool.js';
import { openSpool } from '../../dist/machine/spool.js';
import { putAway } from '../../dist/pipeline/stages/beds.js';
import { viewOf } from '../../dist/pipeline/stages/piece-view.js';
import { PIECES } from '../../dist/pipeline/stages/shape-hub-task.js';
import { planBeds } from '../../dist/planning/beds/plan-beds.js';
import { shapeHub } from '../../dist/shaping/shape-hub.js';
import { randomHub } from '../shaping/random-hub.mjs';

export const title =
  'Printed hubs: 500 random ones with orientation, walls measured, STL, 3MF and pictures on 2 workers (target 30 s on 2 quiet cores); STRUTWRIGHT_HUBS=2000 for the memory';

const MB = 1e6;
/** Hubs that are made in this thread for the table of stages. */
const STAGED = 40;

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
  const spool = await openSpool();
  const started = performance.now();
  const before = process.cpuUsage();
  const pieces = [];
  let [triangles, bytes, objects] = [0, 0, 0];
  let [first, most] = [0, 0];
  const memory = [];
  await pool.each('shape-hub', inputs, async (output, index) => {
    if (index === 0) first = performance.now() - started;
    most = Math.max(most, process.memoryUsage().rss);
    if ((index + 1) % 500 === 0) {
      memory.push(`${index + 1} hubs ${(most / MB).toFixed(0)} MB`);
      most = 0;
    }
    for (const [k, p] of output.shaped.pieces.entries()) {
      triangles += p.triangles.length / 3;
      bytes += output.stl[k].length;
      objects += output.objects[k].bytes.length;
      pieces.push({
        mark: `N${index}`,
        piece: p.piece,
        box: p.box,
        volume: p.volume,
        mass: 0,
        footprint: output.views[k].footprint,
        load: await putAway(output.objects[k], output.views[k], spool),
      });
    }
  });
  const shaped = performance.now() - started;
  const cpu = process.cpuUsage(before);
  await pool.close();
  print(
    `first hub after ${first.toFixed(0)} ms, all in ${(shaped / 1000).toFixed(1)} s, ${((cpu.user + cpu.system) / 1e6).toFixed(1)} s of processor, ${(shaped / count).toFixed(0)} ms each`,
  );
  print(`${triangles} triangles, STL ${(bytes / MB).toFixed(0)} MB, 3MF objects ${(objects / MB).toFixed(0)} MB`);
  print(`largest resident set, both workers included, after each 500: ${memory.join(', ')}`);
  const planning = performance.now();
  const { beds } = planBeds(pieces, made[0].job.printers);
  const planned = performance.now() - planning;
  const byName = new Map(pieces.map((p) => [`${p.mark} ${p.piece}`, p]));
  const writing = performance.now();
  let written = 0;
  for (const bed of beds) {
    const loaded = new Map();
    for (const { mark, piece } of bed.items)
      loaded.set(`${mark} ${piece}`, await byName.get(`${mark} ${piece}`).load());
    const picture = bedPicture(bed, (mark, piece) => loaded.get(`${mark} ${piece}`).plan, deflateBlocks);
    const objectOf = (mark, piece) => ({
      object: loaded.get(`${mark} ${piece}`).object,
      depth: byName.get(`${mark} ${piece}`).box[1],
    });
    written += bedFile(bed, objectOf, 'Random hubs', null, deflateBlocks, picture).length;
  }
  await spool.close();
  print(
    `${beds.length} beds planned in ${planned.toFixed(0)} ms, their 3MF files (${(written / MB).toFixed(0)} MB) in ${(performance.now() - writing).toFixed(0)} ms, resident then ${(process.memoryUsage().rss / MB).toFixed(0)} MB`,
  );
  await stages(made.slice(0, STAGED), print);
}

/** Processor time a hub by stage, in this thread, once it is warm. */
async function stages(made, print) {
  const spent = { solid: 0, stl: 0, object: 0, pictures: 0 };
  const clock = () => {
    const { user, system } = process.cpuUsage();
    return (user + system) / 1000;
  };
  for (const [i, { hub, job }] of [...made, ...made].entries()) {
    const warm = i >= made.length;
    const times = [clock()];
    const { pieces } = await shapeHub(
      hub,
      job,
      hub.sockets.map(() => 1),
    );
    times.push(clock());
    for (const p of pieces) writeStl(p.positions, p.triangles, hub.mark);
    times.push(clock());
    for (const p of pieces) packObject(p.positions, p.triangles, 1, hub.mark, hub.mark, deflateBlocks);
    times.push(clock());
    for (const p of pieces) {
      pieceIcon(p.positions, p.triangles, deflateBlocks);
      viewOf(p);
    }
    times.push(clock());
    if (warm) for (const [k, key] of Object.keys(spent).entries()) spent[key] += times[k + 1] - times[k];
  }
  const ms = (key) => (spent[key] / made.length).toFixed(1);
  print(
    `processor ms a hub: solid with orientation and walls ${ms('solid')}, STL ${ms('stl')}, 3MF object ${ms('object')}, pictures ${ms('pictures')}`,
  );
}
