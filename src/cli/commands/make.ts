import { InvalidArgumentError } from 'commander';
import type { CliCommand } from './command.js';

export const make: CliCommand = {
  usage: 'make <job>',
  summary: 'Make the whole pack of a job: parts, plans and papers, in one folder.',
  examples: [
    'strutwright make my-table/job.json -o pack          the pack in the folder "pack"',
    'strutwright make my-table                           in "my-table/pack"',
    'strutwright make my-table -o pack-B --since pack-A  only what has changed since the pack of revision A',
    'strutwright make my-table/job.json -o pack --json   and its manifest on stdout, for a script',
  ],
  define: (command) =>
    command
      .option('-o, --out <folder>', 'where the pack goes; an earlier pack there is replaced whole')
      .option('--since <pack>', 'an earlier pack: write and plan only what must be made again')
      .option('--watch', 'make it again whenever the job or the truss changes, until stopped')
      .option('--workers <n>', 'threads that shape hubs (default: one a processor, at most 8)', wholeNumber)
      .option('--no-cache', 'do not keep shaped hubs in .strutwright-cache beside the job')
      .option('--json', 'print the manifest as JSON on stdout'),
  async run(call) {
    // Loaded when asked for, so that help and wrong use answer at once.
    const { makeJob } = await import('../make-job.js');
    return makeJob(call);
  },
};

/** Commander turns the InvalidArgumentError into a line of its own. */
function wholeNumber(text: string): number {
  const n = Number(text);
  if (!Number.isInteger(n) || n < 1 || n > 64) throw new InvalidArgumentError('give a whole number from 1 to 64');
  return n;
}
