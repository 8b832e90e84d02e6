import { Worker } from 'node:worker_threads';
import { expect, it } from 'vitest';

const HUBS = Number(process.env['STRUTWRIGHT_HUBS'] ?? 500);
const WORKERS = 2;
/** Fixed, so that a run can be repeated; another can be given to look farther. */
const SEED = Number(process.env['STRUTWRIGHT_SEED'] ?? 20261);

interface Report {
  readonly faults: readonly string[];
  readonly made: number;
  readonly triangles: number;
  readonly worst: number;
}

it(`makes ${HUBS} random hubs that are closed, in one piece, bored and walled (seed ${SEED})`, {
  timeout: 1_800_000,
}, async () => {
  const share = Math.ceil(HUBS / WORKERS);
  const reports = await Promise.all(
    Array.from(
      { length: WORKERS },
      (_, w) =>
        new Promise<Report>((resolve, reject) => {
          const worker = new Worker(new URL('./random-hubs-worker.mjs', import.meta.url), {
            workerData: { seed: SEED, from: w * share, to: Math.min(HUBS, (w + 1) * share) },
          });
          worker.once('message', resolve);
          worker.once('error', reject);
        }),
    ),
  );
  expect(reports.flatMap((r) => r.faults)).toEqual([]);
  expect(reports.reduce((sum, r) => sum + r.made, 0)).toBe(HUBS);
  console.log(
    `seed ${SEED}: ${HUBS} hubs, ${reports.reduce((sum, r) => sum + r.triangles, 0)} triangles, closed-form mass within ` +
      `${(100 * Math.max(...reports.map((r) => r.worst))).toFixed(1)} % of the mesh's`,
  );
});
