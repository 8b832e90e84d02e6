import type { CutCall } from '../../pipeline/cut-pieces.js';
import { EXIT } from '../exit.js';
import type { CliCommand } from './command.js';

export const stock: CliCommand = {
  usage: 'stock <pieces>',
  summary: 'Cut a table of pieces (.csv) from bars at the least price, with a proven bound.',
  examples: [
    'strutwright stock pieces.csv --bar 2000                         as few bars of 2 m as can be',
    'strutwright stock pieces.csv --bar 1000:2.35 --bar 2000:4.20:3  two lengths with prices, three of the long ones',
    'strutwright stock pieces.csv --bar 2400 --rack 640 --rack 310 -o saw-plan.pdf',
    'strutwright stock pack/struts/cut-list.csv --job my-table/job.json',
  ],
  define: (command) =>
    command
      .option(
        '--bar <length:price:available>',
        'a bar that can be bought, mm; price 1 and any number unless given',
        collect,
      )
      .option('--rack <length>', 'an offcut in the rack, mm, used first', collect)
      .option('--kerf <mm>', 'width of the cut (default: the job’s, or 3)')
      .option('--trim <mm>', 'trimmed off one end of a new bar, blade included (default: the job’s, or 5)')
      .option('--job <job>', 'take the saw, the bars and the rack from a job')
      .option('-o, --out <pdf>', 'the saw plan as a PDF; a plan that stands there is replaced')
      .option('--json', 'print the plan as JSON on stdout'),
  async run({ arguments: [file], options, terminal }) {
    const { call, wrong } = readCall(file!, options);
    if (wrong.length > 0) {
      for (const line of wrong) terminal.talk(`strutwright: ${line}\n`);
      return EXIT.refused;
    }
    const [{ cutPieces }, { sayFinding }, { sayCutting }] = await Promise.all([
      import('../../pipeline/cut-pieces.js'),
      import('../../model/findings/index.js'),
      import('../terminal/say-cutting.js'),
    ]);
    const outcome = await cutPieces(call);
    if ('faults' in outcome) {
      for (const fault of outcome.faults) terminal.talk(`${fault}\n`);
      return EXIT.refused;
    }
    const { job, plan, findings, json } = outcome;
    terminal.result(options['json'] ? json : sayCutting(plan, job.stock.currency));
    for (const f of findings) terminal.talk(`${sayFinding(f)}\n`);
    if (call.out) terminal.talk(`Wrote ${call.out}.\n`);
    return findings.length > 0 ? EXIT.flagged : EXIT.clear;
  },
};

const collect = (value: string, before: readonly string[] = []): string[] => [...before, value];

const NUMBER = /^(\d+\.?\d*|\.\d+)$/;

function readCall(
  file: string,
  options: Readonly<Record<string, unknown>>,
): { readonly call: CutCall; readonly wrong: readonly string[] } {
  const wrong: string[] = [];
  const number = (flag: string, text: string, least: number, mend: string): number => {
    const value = NUMBER.test(text.trim()) ? Number(text) : Number.NaN;
    if (!(value >= least && Number.isFinite(value))) wrong.push(`${flag} is "${text}": ${mend}`);
    return value;
  };
  const bars = ((options['bar'] ?? []) as string[]).map((text) => {
    const [length, price, available, ...more] = text.split(':');
    const mend = 'give a length in mm, and perhaps :price and :available, as in 2000:4.20:3';
    if (more.length > 0) wrong.push(`--bar is "${text}": ${mend}`);
    const count = available === undefined ? undefined : number('--bar', available, 0, mend);
    if (count !== undefined && !Number.isInteger(count)) wrong.push(`--bar is "${text}": ${mend}`);
    return {
      length: number('--bar', length!, 1e-3, mend),
      ...(price === undefined ? {} : { price: number('--bar', price, 0, mend) }),
      ...(count === undefined ? {} : { available: count }),
    };
  });
  const optional = (key: string): number | null =>
    options[key] === undefined ? null : number(`--${key}`, String(options[key]), 0, 'give a length in mm, 0 or more');
  const out = options['out'] === undefined ? null : String(options['out']);
  if (out !== null && !/\.pdf$/i.test(out)) wrong.push(`--out is "${out}": give a name that ends in .pdf`);
  return {
    call: {
      file,
      job: options['job'] === undefined ? null : String(options['job']),
      bars,
      rack: ((options['rack'] ?? []) as string[]).map((text) =>
        number('--rack', text, 1e-3, 'give a length in mm above 0'),
      ),
      kerf: optional('kerf'),
      trim: optional('trim'),
      out,
    },
    wrong,
  };
}
