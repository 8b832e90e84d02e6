import { EXIT } from '../exit.js';
import type { CliCommand } from './command.js';

/** `export` is a word of the language, so this command's name differs from its file's. */
export const exportTruss: CliCommand = {
  usage: 'export <job>',
  summary: 'Write the truss (.ifc, .dxf, .obj, .json) and its results (.csv) for other programs.',
  examples: [
    'strutwright export my-table -o truss.ifc    struts, panels and nodes as IFC4, marks as tags',
    'strutwright export my-table -o truss.dxf    lines, faces and marks on layers',
    'strutwright export my-table -o truss.obj    lines and faces as named objects',
    'strutwright export my-table -o forces.csv   the force of every strut in every load case; also',
    '                                            displacements.csv, reactions.csv, findings.csv',
    'strutwright export my-table -o exchange     all of them in one folder',
  ],
  define: (command) =>
    command
      .requiredOption('-o, --out <path>', 'the file to write, its ending says the format; or a folder for all of them')
      .option('-f, --force', 'replace files that are there'),
  async run({ arguments: [path], options, terminal }) {
    const { exportJob } = await import('../../pipeline/export.js');
    const out = String(options['out']);
    const outcome = await exportJob(path!, out, options['force'] === true);
    if ('faults' in outcome) {
      for (const fault of outcome.faults) terminal.talk(`${fault}\n`);
      return EXIT.refused;
    }
    terminal.talk(`Wrote ${outcome.written.join(', ')}.\n`);
    return EXIT.clear;
  },
};
