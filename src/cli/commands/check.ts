import { checkReport } from '../../documents/check-json.js';
import { assess } from '../../pipeline/assess.js';
import { loadJob } from '../../pipeline/load.js';
import { EXIT } from '../exit.js';
import { painter } from '../terminal/paint.js';
import { sayAssessment } from '../terminal/say-assessment.js';
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
