import { EXIT } from '../exit.js';
import type { CliCommand } from './command.js';

/** `export` is a word of the language, so this command's name differs from its file's. */
export const exportTruss: CliCommand = {
  usage: 'export <job>',
  summary: 'Write the truss for other programs: .ifc, .dxf, .obj, or .json.',
  examples: [
    'strutwright export my-table -o truss.ifc    struts, panels and nodes as IFC4, marks as tags',
    'strutwright export my-table -o truss.dxf    lines, faces and marks on layers',
    'strutwright export my-table -o truss.obj    lines and faces as named objects',
  ],
  define: (command) =>
    command
      .requiredOption('-o, --out <file>', 'the file to write; its ending says the format')
      .option('-f, --force', 'replace the file where it is there'),
  async run({ arguments: [path], options, terminal }) {
    const { exportJob } = await import('../../pipeline/export.js');
    const out = String(options['out']);
    const faults = await exportJob(path!, out, options['force'] === true);
    for (const fault of faults) terminal.talk(`${fault}\n`);
    if (faults.length > 0) return EXIT.refused;
    terminal.talk(`Wrote ${out}.\n`);
    return EXIT.clear;
  },
};
