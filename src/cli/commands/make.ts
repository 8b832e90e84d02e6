import { InvalidArgumentError } from 'commander';
import { FileFault } from '../../machine/file-fault.js';
import { join } from '../../machine/paths.js';
import type { Manifest } from '../../pipeline/manifest.js';
import { EXIT } from '../exit.js';
import { painter } from '../terminal/paint.js';
import { progressLine } from '../terminal/progress.js';
import { sayPack } from '../terminal/say-pack.js';
import type { CliCommand } from './command.js';

const WORKER = new URL('../../pipeline/worker.js', import.meta.url);

export const make: CliCommand = {
  usage: 'make <job>',
  summary: 'Make the whole pack of a job: parts, plans and papers, in one folder.',
  examples: [
    'strutwright make my-table/job.json -o pack          the pack in the folder "pack"',
    'strutwright make my-table                           in "my-table/pack"',
    'strutwright make my-table/job.json -o pack --json   and its manifest on stdout, for a script',
  ],
  define: (command) =>
    command
      .option('-o, --out <folder>', 'where the pack goes; an earlier pack there is replaced whole')
      .option('--workers <n>', 'threads that shape hubs (default: one a processor, at most 8)', wholeNumber)
      .option('--json', 'print the manifest as JSON on stdout'),
  async run({ arguments: [path], options, terminal }) {
    // Loaded when asked for, so that help and wrong use answer at once.
    const [{ loadJob }, { makePack }, { openPackFolder }, { openPool }] = await Promise.all([
      import('../../pipeline/load.js'),
      import('../../pipeline/make.js'),
      import('../../machine/pack-folder.js'),
      import('../../machine/pool.js'),
    ]);
    const result = await loadJob(path!);
    if ('faults' in result) {
      for (const fault of result.faults) terminal.talk(`${fault}\n`);
      return EXIT.refused;
    }
    const { job, truss, inputs, folder } = result.loaded;
    const out = options['out'] === undefined ? join(folder, 'pack') : String(options['out']);
    const pool = openPool(WORKER, options['workers'] as number | undefined);
    const progress = progressLine(terminal);
    try {
      const pack = await openPackFolder(out);
      let manifest: Manifest;
      try {
        manifest = await makePack(truss, job, {
          write: async (file, bytes) => void (await pack.write(file, bytes)),
          tell: progress.tell,
          each: pool.each,
          inputs,
        });
        await pack.commit();
      } catch (error) {
        await pack.abandon();
        throw error;
      }
      progress.close();
      terminal.result(
        options['json'] ? `${JSON.stringify(manifest, null, 2)}\n` : sayPack(manifest, out, painter(terminal.colour)),
      );
      return manifest.status === 'clear' ? EXIT.clear : EXIT.flagged;
    } catch (error) {
      progress.close();
      if (!(error instanceof FileFault)) throw error;
      terminal.talk(`${error.message}\n`);
      return EXIT.refused;
    } finally {
      await pool.close();
    }
  },
};

/** Commander turns the InvalidArgumentError into a line of its own. */
function wholeNumber(text: string): number {
  const n = Number(text);
  if (!Number.isInteger(n) || n < 1 || n > 64) throw new InvalidArgumentError('give a whole number from 1 to 64');
  return n;
}
