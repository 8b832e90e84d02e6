import { EXIT } from '../exit.js';
import type { CliCommand } from './command.js';

export const catalogue: CliCommand = {
  usage: 'catalogue [word]',
  summary: 'List the sections and materials that a job can name, with the source of every value.',
  examples: [
    'strutwright catalogue             everything',
    'strutwright catalogue beech       what has the word in its name',
    'strutwright catalogue C24 --json  as data, for a script',
  ],
  define: (command) => command.option('--json', 'print the rows as JSON on stdout'),
  async run({ arguments: [word], options, terminal }) {
    const [{ catalogueRows }, { sayCatalogue }] = await Promise.all([
      import('../../documents/catalogue-rows.js'),
      import('../terminal/say-catalogue.js'),
    ]);
    const rows = catalogueRows(word ?? '');
    if (rows.sections.length + rows.materials.length === 0) {
      terminal.talk(`Nothing in the catalogue has "${word}" in its name; run strutwright catalogue for everything.\n`);
      return EXIT.refused;
    }
    terminal.result(options['json'] ? `${JSON.stringify(rows, null, 2)}\n` : sayCatalogue(rows));
    return EXIT.clear;
  },
};
