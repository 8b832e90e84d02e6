import { Option } from 'commander';
import type { Comparison } from '../../model/comparison.js';
import type { ReadPack } from '../../pipeline/read-pack.js';
import { EXIT } from '../exit.js';
import { painter } from '../terminal/paint.js';
import type { Call, CliCommand } from './command.js';

export const compare: CliCommand = {
  usage: 'compare <old> <new>',
  summary: 'Compare two packs: which parts are unchanged, relabelled, changed, new, withdrawn.',
  examples: [
    'strutwright compare pack-A pack-B          what must be made again, in words',
    'strutwright compare pack-A pack-B --json   the same as data, for a script',
    'strutwright compare pack-A pack-B --pdf revision-B.pdf',
  ],
  define: (command) =>
    command
      .option('--json', 'print the comparison as JSON on stdout')
      .option('--pdf <file>', 'write it as a PDF too, with clouds round what changed')
      .addOption(
        new Option('--paper <size>', 'paper of the PDF; without it, that of the newer pack').choices([
          'A4',
          'A3',
          'Letter',
        ]),
      ),
  async run({ arguments: [before, after], options, terminal }) {
    const [{ comparePacks }, { readPack }, { sayComparison }] = await Promise.all([
      import('../../pipeline/compare.js'),
      import('../../pipeline/read-pack.js'),
      import('../terminal/say-comparison.js'),
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
    return options['pdf'] === undefined
      ? EXIT.clear
      : writePaper(comparison, old.pack, now.pack, { options, terminal });
  },
};

async function writePaper(
  comparison: Comparison,
  before: ReadPack,
  after: ReadPack,
  { options, terminal }: Pick<Call, 'options' | 'terminal'>,
): Promise<number> {
  const [{ comparisonPaper }, { FileFault }, { isPdf }, { writeOne }] = await Promise.all([
    import('../../pipeline/comparison-paper.js'),
    import('../../machine/file-fault.js'),
    import('../../machine/files.js'),
    import('../../machine/write-one.js'),
  ]);
  const out = String(options['pdf']);
  try {
    const bytes = await comparisonPaper(
      comparison,
      before,
      after,
      options['paper'] as 'A4' | 'A3' | 'Letter' | undefined,
    );
    // An earlier PDF is replaced, nothing else is.
    await writeOne(out, bytes, await isPdf(out));
  } catch (error) {
    if (!(error instanceof FileFault)) throw error;
    terminal.talk(`${error.message}\n`);
    return EXIT.refused;
  }
  terminal.talk(`Wrote ${out}.\n`);
  return EXIT.clear;
}
