import { EXIT } from '../exit.js';
import type { CliCommand } from './command.js';

/** A template file is a few hundred kilobytes at most. */
const MOST_BYTES = 10_000_000;

/** Said in the help, which reads no file; a test holds it against the folder of templates. */
export const TEMPLATES: readonly string[] = ['garden-pavilion', 'table-model', 'table-model-us'];

export const newJob: CliCommand = {
  usage: 'new <folder>',
  summary: 'Write a working job and truss into a new folder.',
  examples: [
    'strutwright new my-table                              a table-top model of dowels and printed hubs',
    'strutwright new my-garden --template garden-pavilion  another template',
  ],
  define: (command) =>
    command.option('-t, --template <name>', `which template: ${TEMPLATES.join(', ')}`, 'table-model'),
  async run({ arguments: [folder], options, terminal }) {
    const [
      { FileFault },
      { readText },
      { listFolder },
      { join },
      { templateFolder, templateNames },
      { writeOne },
      { nearest },
    ] = await Promise.all([
      import('../../machine/file-fault.js'),
      import('../../machine/files.js'),
      import('../../machine/folders.js'),
      import('../../machine/paths.js'),
      import('../../machine/templates.js'),
      import('../../machine/write-one.js'),
      import('../../maths/nearest.js'),
    ]);
    const name = String(options['template']);
    const names = await templateNames();
    if (!names.includes(name)) {
      const near = nearest(name, names);
      terminal.talk(
        `strutwright: there is no template "${name}": ${near ? `did you mean "${near}"?` : `choose one of ${names.join(', ')}`}\n`,
      );
      return EXIT.refused;
    }
    try {
      const present = await listFolder(folder!);
      if (present && present.length > 0) {
        terminal.talk(`${folder}: is not empty: choose a new folder\n`);
        return EXIT.refused;
      }
      const from = templateFolder(name);
      for (const file of ['job.json', 'truss.json']) {
        await writeOne(join(folder!, file), await readText(join(from, file), MOST_BYTES));
      }
    } catch (error) {
      if (!(error instanceof FileFault)) throw error;
      terminal.talk(`${error.message}\n`);
      return EXIT.refused;
    }
    terminal.talk(
      `Wrote ${join(folder!, 'job.json')} and ${join(folder!, 'truss.json')}. Next: strutwright make ${join(folder!, 'job.json')} -o ${join(folder!, 'pack')}\n`,
    );
    return EXIT.clear;
  },
};
