import { openCache } from '../machine/cache.js';
import { FileFault } from '../machine/file-fault.js';
import { openPackFolder } from '../machine/pack-folder.js';
import { join } from '../machine/paths.js';
import { openPool, type Pool } from '../machine/pool.js';
import { buildOf } from '../machine/program.js';
import { openSpool } from '../machine/spool.js';
import { watchFiles } from '../machine/watch.js';
import { VERSION } from '../model/version.js';
import { cachedEach } from '../pipeline/cached-each.js';
import { type LoadedJob, loadJob } from '../pipeline/load.js';
import { makePack } from '../pipeline/make.js';
import type { Manifest } from '../pipeline/manifest.js';
import { readPack } from '../pipeline/read-pack.js';
import type { Since } from '../pipeline/since.js';
import type { Call } from './commands/command.js';
import { EXIT } from './exit.js';
import { type StopSignals, stopSignals } from './stop-signals.js';
import { painter } from './terminal/paint.js';
import { progressLine } from './terminal/progress.js';
import { sayPack } from './terminal/say-pack.js';
import type { Terminal } from './terminal/terminal.js';

const WORKER = new URL('../pipeline/worker.js', import.meta.url);
/** Beside the job; safe to delete. */
export const CACHE_FOLDER = '.strutwright-cache';

/** The command `make` once its line is understood: makes the pack once, or again after every change. Gives the exit status. */
export async function makeJob(call: Call): Promise<number> {
  const pool = openPool(WORKER, call.options['workers'] as number | undefined);
  const stop = stopSignals(call.terminal);
  try {
    return call.options['watch'] ? await followFiles(call, pool, stop) : await makeOnce(call, pool, stop);
  } finally {
    stop.forget();
    await pool.close();
  }
}

/** Makes the pack again after each change of its inputs; ends with the process. */
async function followFiles(call: Call, pool: Pool, stop: StopSignals): Promise<never> {
  const path = call.arguments[0]!;
  for (;;) {
    const read = await loadJob(path);
    const known = 'loaded' in read ? read.loaded.inputs.map((i) => join(read.loaded.folder, i.path)) : read.files;
    // The watch stands before the run, so that a change during the run is not missed.
    const watch = watchFiles([path, join(path, 'job.json'), ...known]);
    await makeOnce(call, pool, stop);
    call.terminal.talk('Waiting for a change of the job or the truss; Ctrl+C ends.\n');
    await watch.next();
    watch.close();
  }
}

async function makeOnce(
  { arguments: [path], options, terminal }: Call,
  pool: Pool,
  stop: StopSignals,
): Promise<number> {
  const result = await loadJob(path!);
  if ('faults' in result) return refuse(terminal, result.faults);
  const { loaded } = result;
  const earlier = options['since'] === undefined ? null : await readPack(String(options['since']));
  if (earlier && 'faults' in earlier) return refuse(terminal, earlier.faults);
  const out = options['out'] === undefined ? join(loaded.folder, 'pack') : String(options['out']);
  const progress = progressLine(terminal);
  try {
    const cache = options['cache'] === false ? null : await openCache(cacheOf(loaded), await buildOf(VERSION));
    const each = cache ? cachedEach(pool.each, cache) : pool.each;
    const manifest = await writePack(loaded, out, { each, tell: progress.tell, since: earlier?.pack.manifest, stop });
    await cache?.prune();
    progress.close();
    terminal.result(
      options['json'] ? `${JSON.stringify(manifest, null, 2)}\n` : sayPack(manifest, out, painter(terminal.colour)),
    );
    return manifest.status === 'clear' ? EXIT.clear : EXIT.flagged;
  } catch (error) {
    progress.close();
    if (!(error instanceof FileFault)) throw error;
    return refuse(terminal, [error.message]);
  }
}

/** Each job of a folder has its own, since a run forgets what it did not use. */
const cacheOf = ({ folder, inputs }: LoadedJob): string => join(folder, CACHE_FOLDER, inputs[0]!.path);

function refuse(terminal: Terminal, faults: readonly string[]): number {
  for (const fault of faults) terminal.talk(`${fault}\n`);
  return EXIT.refused;
}

/** The pack in its folder, whole or not at all. */
async function writePack(
  { job, truss, inputs }: LoadedJob,
  out: string,
  how: {
    readonly each: Pool['each'];
    readonly tell: ReturnType<typeof progressLine>['tell'];
    readonly since: Since | undefined;
    readonly stop: StopSignals;
  },
): Promise<Manifest> {
  const pack = await openPackFolder(out);
  how.stop.before(async () => {
    await pack.abandon();
    return 'Stopped before the pack was whole; nothing of it was kept.';
  });
  // Without a place for temporary files everything stays in memory.
  const spool = await openSpool().catch(() => null);
  try {
    const manifest = await makePack(truss, job, {
      ...(spool ? { spool } : {}),
      write: async (file, bytes) => void (await pack.write(file, bytes)),
      tell: how.tell,
      each: how.each,
      inputs,
      ...(how.since ? { since: how.since } : {}),
    });
    const committed = pack.commit();
    how.stop.before(async () => {
      await committed;
      return 'Stopped after the pack was whole.';
    });
    await committed;
    return manifest;
  } catch (error) {
    await pack.abandon();
    throw error;
  } finally {
    how.stop.before(null);
    await spool?.close();
  }
}
