import { InvalidArgumentError } from 'commander';
import type { Job } from '../../model/job/index.js';
import { EXIT } from '../exit.js';
import type { CliCommand } from './command.js';

const PROCESSES: readonly Job['nodes']['process'][] = ['filament', 'powder', 'resin'];

export const gauge: CliCommand = {
  usage: 'gauge [job]',
  summary: 'Make the fit gauge of each section (STL, 3MF), the kerf comb (SVG, DXF) and the sheet to read them by.',
  examples: [
    'strutwright gauge my-table/job.json                    in "my-table/gauge", for the sections of its struts',
    'strutwright gauge my-table -o gauge --section beech-8  for one section',
    'strutwright gauge --section beech-12 --process powder -o gauge   without a job',
    'strutwright gauge --section beech-8 --clearance 0.3 -o gauge     with 0.3 mm in the middle',
  ],
  define: (command) =>
    command
      .option('-o, --out <folder>', 'where the files go; an earlier gauge there is replaced whole')
      .option('--section <name>', 'a section of the job or the catalogue; may be repeated', collect)
      .option('--process <name>', 'filament, powder or resin (default: the job’s, or filament)', processOf)
      .option('--clearance <mm>', 'the clearance in the middle (default: the job’s, or by process and size)', lengthOf)
      .option('--json', 'print what the gauges try as JSON on stdout'),
  async run({ arguments: [path], options, terminal }) {
    if (path === undefined && options['out'] === undefined && !options['json']) {
      terminal.talk('strutwright: give a job, or a folder with -o, or --json for the values alone\n');
      return EXIT.refused;
    }
    // Loaded when asked for, so that help and wrong use answer at once.
    const [{ FileFault }, { openPackFolder }, { join }, { planGauge, makeGauge, gaugeJson }, { sayGauge }] =
      await Promise.all([
        import('../../machine/file-fault.js'),
        import('../../machine/pack-folder.js'),
        import('../../machine/paths.js'),
        import('../../pipeline/gauge.js'),
        import('../terminal/say-gauge.js'),
      ]);
    const outcome = await planGauge({
      job: path ?? null,
      sections: (options['section'] as string[] | undefined) ?? [],
      process: (options['process'] as Job['nodes']['process'] | undefined) ?? null,
      clearance: (options['clearance'] as number | undefined) ?? null,
    });
    if ('faults' in outcome) return refuse(outcome.faults);
    const { plan } = outcome;
    const out =
      options['out'] !== undefined ? String(options['out']) : plan.folder === null ? null : join(plan.folder, 'gauge');
    let failed: readonly string[] = [];
    if (out !== null && !(options['json'] && options['out'] === undefined)) {
      try {
        const folder = await openPackFolder(out);
        try {
          failed = await makeGauge(plan, async (file, bytes) => void (await folder.write(file, bytes)));
          await folder.commit();
        } catch (error) {
          await folder.abandon();
          throw error;
        }
      } catch (error) {
        if (!(error instanceof FileFault)) throw error;
        return refuse([error.message]);
      }
    }
    terminal.result(options['json'] ? `${JSON.stringify(gaugeJson(plan), null, 2)}\n` : sayGauge(plan, out!));
    for (const name of failed) terminal.talk(`${name}: its gauge could not be made; give another clearance\n`);
    return failed.length > 0 ? EXIT.flagged : EXIT.clear;

    function refuse(faults: readonly string[]): number {
      for (const fault of faults) terminal.talk(`${fault}\n`);
      return EXIT.refused;
    }
  },
};

const collect = (value: string, before: readonly string[] = []): string[] => [...before, value];

function processOf(text: string): string {
  if (!PROCESSES.some((p) => p === text)) throw new InvalidArgumentError('give filament, powder or resin');
  return text;
}

/** More than this is no clearance, mm. */
const LOOSEST = 5;

function lengthOf(text: string): number {
  const n = Number(text);
  if (text.trim() === '' || !(n >= 0 && n <= LOOSEST)) throw new InvalidArgumentError(`give mm, 0 to ${LOOSEST}`);
  return n;
}
