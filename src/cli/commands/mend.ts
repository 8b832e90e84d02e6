import { EXIT } from '../exit.js';
import type { CliCommand } from './command.js';

export const mend: CliCommand = {
  usage: 'mend <job>',
  summary: 'Move nodes as little as possible until faces are flat and forces balance. Takes a job or a truss file.',
  examples: [
    'strutwright mend my-table/job.json                                what would move, and how far',
    'strutwright mend my-table/job.json -o my-table/truss-mended.json  and a truss file with it',
    'strutwright mend truss.json --flatness --keep A01,A02 --bound 2   flat faces alone, two nodes kept',
  ],
  define: (command) =>
    command
      .option('-o, --out <truss>', 'write the mended truss file; an existing file is never replaced')
      .option('--flatness', 'make faces flat and leave the forces alone')
      .option('--equilibrium', 'balance the forces and leave the faces alone')
      .option('--keep <nodes>', 'nodes that stay, with commas between; supports always stay')
      .option('--bound <mm>', 'refuse where a node would move farther, mm as built; otherwise 0.5')
      .option('--keep-forces', 'move nodes alone: every force stays as given')
      .option(
        '--force-bound <share>',
        'refuse where a force would change by more than this share of the largest; otherwise 0.01',
      )
      .option('--json', 'print the movements as JSON on stdout'),
  async run({ arguments: [path], options, terminal }) {
    const wrong = wrongOptions(options);
    if (wrong.length > 0) {
      for (const line of wrong) terminal.talk(`strutwright: ${line}\n`);
      return EXIT.refused;
    }
    // Loaded when asked for, so that help and wrong use answer at once.
    const [{ mendReport }, { FileFault }, { writeOne }, { mendFile }, { sayMending }] = await Promise.all([
      import('../../documents/mend-json.js'),
      import('../../machine/file-fault.js'),
      import('../../machine/write-one.js'),
      import('../../pipeline/mend.js'),
      import('../terminal/say-mending.js'),
    ]);
    const number = (key: string): number | undefined => (options[key] === undefined ? undefined : Number(options[key]));
    const [bound, forceBound] = [number('bound'), number('forceBound')];
    const outcome = await mendFile(path!, {
      ...(options['flatness'] ? { what: 'flatness' as const } : {}),
      ...(options['equilibrium'] ? { what: 'equilibrium' as const } : {}),
      ...(options['keepForces'] ? { forceChange: 'keep' as const } : {}),
      ...(bound === undefined ? {} : { bound }),
      ...(forceBound === undefined ? {} : { forceBound }),
      keep: typeof options['keep'] === 'string' ? options['keep'].split(',').map((mark) => mark.trim()) : [],
    });
    if ('faults' in outcome) {
      for (const fault of outcome.faults) terminal.talk(`${fault}\n`);
      return EXIT.refused;
    }
    const out = options['out'];
    try {
      if (typeof out === 'string' && outcome.text !== null) await writeOne(out, outcome.text);
    } catch (error) {
      if (!(error instanceof FileFault)) throw error;
      terminal.talk(`${error.message}\n`);
      return EXIT.refused;
    }
    terminal.result(
      options['json'] ? `${JSON.stringify(mendReport(outcome.mended), null, 2)}\n` : sayMending(outcome.mended),
    );
    if (typeof out === 'string') {
      terminal.talk(
        outcome.text !== null ? `Wrote ${out}; name it under "truss" in the job.\n` : 'Nothing was written.\n',
      );
    }
    return outcome.mended.done ? EXIT.clear : EXIT.flagged;
  },
};

function wrongOptions(options: Readonly<Record<string, unknown>>): string[] {
  const number = (key: string, flag: string, what: string): string[] => {
    const value = options[key];
    if (value === undefined) return [];
    const fine = String(value).trim() !== '' && Number.isFinite(Number(value)) && Number(value) > 0;
    return fine ? [] : [`${flag} is "${value}": give ${what} above 0`];
  };
  return [
    ...number('bound', '--bound', 'a length in mm'),
    ...number('forceBound', '--force-bound', 'a share'),
    ...(options['flatness'] && options['equilibrium']
      ? ['--flatness and --equilibrium stand together: give one, or neither for both']
      : []),
  ];
}
