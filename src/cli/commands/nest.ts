import { InvalidArgumentError } from 'commander';
import type { NestCall } from '../../pipeline/nest.js';
import type { NestingSheet } from '../../planning/nesting/request.js';
import { EXIT } from '../exit.js';
import type { CliCommand } from './command.js';

const WORKER = new URL('../../pipeline/worker.js', import.meta.url);
const TURNS = { free: null, quarter: [0, 90, 180, 270], half: [0, 180], fixed: [0] } as const;

export const nest: CliCommand = {
  usage: 'nest <outlines>',
  summary: 'Lay flat outlines (.json, .dxf, .svg) on sheets and write the machine files.',
  examples: [
    'strutwright nest panels.dxf -o cut                                 on sheets of 600 x 400 mm',
    'strutwright nest panels.svg --sheet 1000x600 --sheet 300x200*2 -o cut',
    'strutwright nest outlines.json --rotations half --kerf 0.18 -o cut   with the grain, kerf as measured',
    'strutwright nest outlines.json --json                              the plan alone, on stdout',
  ],
  define: (command) =>
    command
      .option('-o, --out <folder>', 'where the sheets go; an earlier result there is replaced whole')
      .option(
        '--sheet <size>',
        'width x height in mm, "*n" where there are only n; may be repeated (default: 600x400)',
        sheetOf,
      )
      .option('--spacing <mm>', 'least distance between panels', lengthOf)
      .option('--margin <mm>', 'least distance from the edge of the sheet', lengthOf)
      .option('--kerf <mm>', 'full width of the cut; 0 leaves it to the shop', lengthOf)
      .option('--rotations <kind>', 'free, quarter, half or fixed', turnOf)
      .option('--seed <n>', 'another seed, another search', wholeOf)
      .option('--effort <times>', 'evaluations of the search, as a multiple of the usual', effortOf)
      .option('--time-limit <seconds>', 'stop after this; the plan then depends on the machine', effortOf)
      .option('--json', 'print the plan as JSON on stdout'),
  async run({ arguments: [file], options, terminal }) {
    if (options['out'] === undefined && !options['json']) {
      terminal.talk('strutwright: give a folder with -o, or --json for the plan alone\n');
      return EXIT.refused;
    }
    // Loaded when asked for, so that help and wrong use answer at once.
    const [
      { sayKerf },
      { FileFault },
      { openPackFolder },
      { openPool },
      { cutterSchema },
      { nestFile, nestJson, writeNest },
    ] = await Promise.all([
      import('../../documents/panels/kerf.js'),
      import('../../machine/file-fault.js'),
      import('../../machine/pack-folder.js'),
      import('../../machine/pool.js'),
      import('../../model/job/panels.js'),
      import('../../pipeline/nest.js'),
    ]);
    const usual = cutterSchema.parse(undefined);
    const kerf = options['kerf'] as number | undefined;
    const sheets = (options['sheet'] as NestingSheet[] | undefined) ?? [];
    const limit = options['timeLimit'] as number | undefined;
    const call: NestCall = {
      file: file!,
      sheets: sheets.length > 0 ? sheets : [{ name: '600 x 400', width: 600, height: 400 }],
      cutter: {
        ...usual,
        spacing_mm: (options['spacing'] as number | undefined) ?? usual.spacing_mm,
        margin_mm: (options['margin'] as number | undefined) ?? usual.margin_mm,
        kerf_mm: kerf ?? usual.kerf_mm,
        kerfMeasured: kerf !== undefined && kerf > 0,
        compensate: kerf === 0 ? 'shop' : 'here',
        effort: (options['effort'] as number | undefined) ?? 1,
      },
      rotations: TURNS[(options['rotations'] as keyof typeof TURNS | undefined) ?? 'free'],
      seed: (options['seed'] as number | undefined) ?? 1,
      timeLimitMs: limit === undefined ? null : limit * 1000,
    };
    // Run from its source, as tests do, the program has no compiled worker: this thread then does all, with the same result.
    const pool = import.meta.url.endsWith('.ts') ? null : openPool(WORKER);
    const outcome = await nestFile(call, { clock: Date.now, ...(pool && { each: pool.each }) }).finally(() =>
      pool?.close(),
    );
    if ('faults' in outcome) {
      for (const fault of outcome.faults) terminal.talk(`${fault}\n`);
      return EXIT.refused;
    }
    const { answer, reading } = outcome;
    if (options['out'] !== undefined) {
      try {
        const folder = await openPackFolder(String(options['out']));
        try {
          await writeNest(call, outcome, async (path, bytes) => void (await folder.write(path, bytes)));
          await folder.commit();
        } catch (error) {
          await folder.abandon();
          throw error;
        }
      } catch (error) {
        if (!(error instanceof FileFault)) throw error;
        terminal.talk(`${error.message}\n`);
        return EXIT.refused;
      }
    }
    if (options['json']) terminal.result(`${JSON.stringify(nestJson(call, outcome), null, 2)}\n`);
    else {
      const count = answer.sheets.reduce((sum, s) => sum + s.placements.length, 0);
      terminal.result(
        `${count} panels on ${answer.sheets.length} sheets; no plan has fewer than ${answer.lowerBound}.\n`,
      );
      answer.sheets.forEach((s, i) => {
        terminal.result(
          `  sheet ${i + 1}, ${s.sheet}: ${s.placements.length} panels use ${(100 * s.yield).toFixed(1)} %\n`,
        );
      });
      terminal.result(`${sayKerf(call.cutter)}.\n`);
      if (answer.stopped) terminal.result('Stopped by the time limit: another run may give another plan.\n');
    }
    for (const u of answer.unplaced)
      terminal.talk(
        `${u.mark}: ${u.quantity} ${u.reason === 'too-large' ? 'fit on no sheet: give a larger sheet' : 'have no sheet left: allow more sheets'}\n`,
      );
    for (const [what, n] of reading.leftOut) terminal.talk(`${file}: left out ${n} ${what}\n`);
    return answer.unplaced.length > 0 ? EXIT.flagged : EXIT.clear;
  },
};

function sheetOf(text: string, before: NestingSheet[] = []): NestingSheet[] {
  const m = /^\s*(\d+(?:\.\d+)?)\s*[x×]\s*(\d+(?:\.\d+)?)\s*(?:\*\s*(\d+))?\s*$/i.exec(text);
  if (!m || !(Number(m[1]) > 0 && Number(m[2]) > 0))
    throw new InvalidArgumentError('give width x height in mm, as 600x400 or 600x400*3');
  const name = `${m[1]} x ${m[2]}`;
  if (before.some((s) => s.name === name))
    throw new InvalidArgumentError('this size was given before; add the numbers up');
  return [
    ...before,
    { name, width: Number(m[1]), height: Number(m[2]), ...(m[3] === undefined ? {} : { available: Number(m[3]) }) },
  ];
}

function lengthOf(text: string): number {
  const n = Number(text);
  if (text.trim() === '' || !(n >= 0 && Number.isFinite(n)))
    throw new InvalidArgumentError('give a length in mm, 0 or more');
  return n;
}

function effortOf(text: string): number {
  const n = Number(text);
  if (!(n > 0 && Number.isFinite(n))) throw new InvalidArgumentError('give a number above 0');
  return n;
}

function wholeOf(text: string): number {
  const n = Number(text);
  if (!Number.isInteger(n) || n < 0) throw new InvalidArgumentError('give a whole number, 0 or more');
  return n;
}

function turnOf(text: string): string {
  if (!(text in TURNS)) throw new InvalidArgumentError('give free, quarter, half or fixed');
  return text;
}
