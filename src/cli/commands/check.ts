import { EXIT } from '../exit.js';
import { painter } from '../terminal/paint.js';
import type { CliCommand } from './command.js';

export const check: CliCommand = {
  usage: 'check <job>',
  summary: 'Check a job: balance, flatness, lengths, strength. Writes no file.',
  examples: [
    'strutwright check my-table/job.json            what is wrong, in words',
    'strutwright check my-table/job.json --json     the same as data, for a script',
  ],
  define: (command) => command.option('--json', 'print the check as JSON on stdout'),
  async run({ arguments: [path], options, terminal }) {
    // Loaded when asked for, so that help and wrong use answer at once.
    const [{ checkReport }, { assess }, { loadJob }, { sayAssessment }] = await Promise.all([
      import('../../documents/check-json.js'),
      import('../../pipeline/assess.js'),
      import('../../pipeline/load.js'),
      import('../terminal/say-assessment.js'),
    ]);
    const result = await loadJob(path!);
    if ('faults' in result) {
      for (const fault of result.faults) terminal.talk(`${fault}\n`);
      return EXIT.refused;
    }
    const assessment = assess(result.loaded.truss, result.loaded.job);
    terminal.result(
      options['json']
        ? `${JSON.stringify(checkReport(assessment), null, 2)}\n`
        : sayAssessment(assessment, painter(terminal.colour)),
    );
    return assessment.status === 'clear' ? EXIT.clear : EXIT.flagged;
  },
};
