import { parentPort, workerData } from 'node:worker_threads';
import { checkHub, randomHub } from './random-hub.mjs';

const { seed, from, to } = workerData;
const faults = [];
let [made, triangles, worst] = [0, 0, 0];
for (let k = from; k < to; k++) {
  const random = randomHub(seed + k);
  if (!random.hub.makeable) {
    faults.push(`${seed + k}: not makeable`);
    continue;
  }
  // Crossings take longer than the solid: every sixteenth hub.
  const result = await checkHub(random, { cross: k % 16 === 0, samples: 12 });
  made++;
  triangles += result.triangles ?? 0;
  worst = Math.max(worst, Math.abs((result.closedForm ?? 0) / (result.volume ?? 1) - 1));
  for (const fault of result.faults) faults.push(`${seed + k}, ${random.hub.sockets.length} struts: ${fault}`);
}
parentPort.postMessage({ faults, made, triangles, worst });
