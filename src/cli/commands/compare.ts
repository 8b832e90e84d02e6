import { EXIT } from '../exit.js';
import { painter } from '../terminal/paint.js';
import { sayComparison } from '../terminal/say-comparison.js';
import type { CliCommand } from './command.js';

export const compare: CliCommand = {
  usage: 'compare <old> <new>',
  summary: 'Compare two packs: which parts are unchanged, relabelled, changed, new, withdrawn.',
  examples: [
    'strutwright compare pack-A pack-B          what must be made again, in words',
    'strutwright compare pack-A pack-B --json   the same as data, for a script',
  ],
  define: (command) => command.option('--json', 'print the comparison as JSON on stdout'),
  async run({ arguments: [before, after], options, terminal }) {
    const [{ comparePacks }, { readPack }] = await Promise.all([
      import('../../pipeline/compare.js'),
      import('../../pipeline/read-pack.js'),
    ]);
    const [old, now] = [await readPack(before!), await readPack(after!)];
    const faults = [old, now].flatMap((read) => ('faults' in read ? read.faults : []));
    if ('faults' in old || 'faults' in now) {
      for (const fault of faults) terminal.talk(`${fault}\n`);
      return EXIT.refused;
    }
    const comparison = await comparePacks(old.pack, now.pack);
    terminal.result(
      options['json']
        ? `${JSON.stringify(comparison, null, 2)}\n`
        : sayComparison(comparison, painter(terminal.colour)),
    );
    return EXIT.clear;
  },
};
