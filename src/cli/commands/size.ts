import { EXIT } from '../exit.js';
import type { CliCommand } from './command.js';

export const size: CliCommand = {
  usage: 'size <job>',
  summary: "Choose the lightest of the job's struts.sizes for every strut or group that passes.",
  examples: [
    'strutwright size my-table/job.json                               what would change, and what it weighs',
    'strutwright size my-table/job.json -o my-table/truss-sized.json  and a truss file with the sections in it',
    'strutwright size my-table/job.json --json                        the same as data, for a script',
  ],
  define: (command) =>
    command
      .option('-o, --out <truss>', 'write the truss file with the chosen sections; an existing file is never replaced')
      .option('--json', 'print the choices as JSON on stdout'),
  async run({ arguments: [path], options, terminal }) {
    // Loaded when asked for, so that help and wrong use answer at once.
    const [
      { sizingReport },
      { withSections },
      { FileFault },
      { readText },
      { join },
      { writeOne },
      { LIMITS },
      { loadJob },
      { sizeJob },
      { saySizing },
    ] = await Promise.all([
      import('../../documents/sizing-json.js'),
      import('../../documents/truss/with-sections.js'),
      import('../../machine/file-fault.js'),
      import('../../machine/files.js'),
      import('../../machine/paths.js'),
      import('../../machine/write-one.js'),
      import('../../model/limits.js'),
      import('../../pipeline/load.js'),
      import('../../pipeline/size-job.js'),
      import('../terminal/say-sizing.js'),
    ]);
    const result = await loadJob(path!);
    if ('faults' in result) {
      for (const fault of result.faults) terminal.talk(`${fault}\n`);
      return EXIT.refused;
    }
    const { truss, job, folder } = result.loaded;
    const sizing = await sizeJob(truss, job);
    const out = options['out'];
    try {
      if (typeof out === 'string' && sizing.choices.length > 0) {
        const text = await readText(join(folder, job.truss), 4 * LIMITS.fileCharacters);
        await writeOne(
          out,
          withSections(
            text,
            sizing.truss.members.map((m) => m.section!),
          ),
        );
      }
    } catch (error) {
      if (!(error instanceof FileFault)) throw error;
      terminal.talk(`${error.message}\n`);
      return EXIT.refused;
    }
    terminal.result(options['json'] ? `${JSON.stringify(sizingReport(sizing), null, 2)}\n` : saySizing(sizing));
    if (typeof out === 'string' && sizing.choices.length > 0)
      terminal.talk(`Wrote ${out}; name it under "truss" in the job.\n`);
    return sizing.findings.some((f) => f.level !== 'note') ? EXIT.flagged : EXIT.clear;
  },
};
