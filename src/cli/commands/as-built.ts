import { EXIT } from '../exit.js';
import type { CliCommand } from './command.js';

/** A table of measurements of the largest truss. */
const MOST_BYTES = 50_000_000;

export const asBuilt: CliCommand = {
  usage: 'as-built <job> <measured>',
  summary: 'Correct the cut lengths of struts not yet cut, from what was measured on those that are.',
  examples: [
    'strutwright as-built my-table/job.json lengths.csv   columns mark,length_mm: cut lengths as measured',
    'strutwright as-built my-table/job.json nodes.csv     columns node,x_mm,y_mm,z_mm: nodes as they stand',
  ],
  define: (command) => command.option('--json', 'print the corrections as JSON on stdout'),
  async run({ arguments: [path, table], options, terminal }) {
    // Loaded when asked for, so that help and wrong use answer at once.
    const [{ FileFault }, { readText }, { assess }, { loadJob }, { correctCuts }, { sayFault }, { readMeasured }] =
      await Promise.all([
        import('../../machine/file-fault.js'),
        import('../../machine/files.js'),
        import('../../pipeline/assess.js'),
        import('../../pipeline/load.js'),
        import('../../planning/fit-up/as-built.js'),
        import('../../readers/fault.js'),
        import('../../readers/measured.js'),
      ]);
    const refuse = (lines: readonly string[]): number => {
      for (const line of lines) terminal.talk(`${line}\n`);
      return EXIT.refused;
    };
    const result = await loadJob(path!);
    if ('faults' in result) return refuse(result.faults);
    let text: string;
    try {
      text = await readText(table!, MOST_BYTES);
    } catch (error) {
      if (!(error instanceof FileFault)) throw error;
      return refuse([error.message]);
    }
    const { job, truss } = result.loaded;
    const { measured, faults } = readMeasured(text, table!, {
      struts: new Set(truss.members.map((m) => m.mark)),
      nodes: new Set(truss.nodes.map((n) => n.mark)),
    });
    if (!measured) return refuse(faults.map(sayFault));
    const { topology, parts } = assess(truss, job);
    const corrections = correctCuts(topology, parts, job, measured);
    if (options['json']) terminal.result(`${JSON.stringify(corrections, null, 2)}\n`);
    else {
      terminal.result('mark,cut_length_mm,planned_mm\n');
      for (const c of corrections)
        terminal.result(`${c.mark},${c.corrected_mm.toFixed(3)},${c.planned_mm.toFixed(3)}\n`);
    }
    return EXIT.clear;
  },
};
