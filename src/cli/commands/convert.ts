import { LENGTH_UNITS, type LengthUnit } from '../../model/units.js';
import { EXIT } from '../exit.js';
import type { CliCommand } from './command.js';

export const convert: CliCommand = {
  usage: 'convert <file>',
  summary: 'Make a truss file of a drawing (.dxf), a mesh (.obj, .ply) or tables (.csv).',
  examples: [
    'strutwright convert frame.dxf -o my-table/truss.json                       lines and faces of a drawing',
    'strutwright convert frame.obj -o truss.json --unit m --up y --find-faces   and the faces between its lines',
    'strutwright convert frame-B.dxf -o my-table/truss.json --force             a new state of it: parts keep their marks',
    'strutwright convert nodes.csv --members struts.csv --unit mm --up z -o truss.json',
  ],
  define: (command) =>
    command
      .requiredOption('-o, --out <truss>', 'the truss file to write; job.marks.json beside it keeps the marks')
      .option('--unit <unit>', `unit of the file: ${LENGTH_UNITS.join(', ')}; asked for where the file does not say`)
      .option('--up <axis>', 'the axis that points up: y or z; asked for where the file does not say')
      .option('--merge <mm>', 'join ends no farther apart than this; otherwise a millionth of the size')
      .option('--split', 'make nodes where struts cross, and split struts at nodes on them')
      .option('--find-faces', 'find faces as planar minimal cycles where the file has none')
      .option('--panels', 'make every face a panel')
      .option('--members <csv>', 'struts by node names, beside a table of nodes')
      .option('--forces <csv>', 'forces by node pair: from, to, force')
      .option('-f, --force', 'replace a truss file that is there; its supports, loads and cells are not kept')
      .option('--json', 'print the report as JSON on stdout'),
  async run({ arguments: [file], options, terminal }) {
    const wrong = wrongOptions(options);
    if (wrong.length > 0) {
      for (const line of wrong) terminal.talk(`strutwright: ${line}\n`);
      return EXIT.refused;
    }
    const [{ convertFile }, { sayConversion }] = await Promise.all([
      import('../../pipeline/convert.js'),
      import('../terminal/say-conversion.js'),
    ]);
    const text = (key: string): string | null => (typeof options[key] === 'string' ? (options[key] as string) : null);
    const outcome = await convertFile({
      file: file!,
      members: text('members'),
      forces: text('forces'),
      out: text('out')!,
      unit: text('unit') as LengthUnit | null,
      up: text('up') as 'y' | 'z' | null,
      merge: options['merge'] === undefined ? null : Number(options['merge']),
      split: options['split'] === true,
      findFaces: options['findFaces'] === true,
      panels: options['panels'] === true,
      replace: options['force'] === true,
    });
    if ('faults' in outcome) {
      for (const fault of outcome.faults) terminal.talk(`${fault}\n`);
      return EXIT.refused;
    }
    const { report } = outcome.converted;
    if (options['json']) terminal.result(`${JSON.stringify(report, null, 2)}\n`);
    else terminal.result(sayConversion(report));
    if (outcome.fileUnit && outcome.fileUnit !== outcome.unit)
      terminal.talk(`${file} says ${outcome.fileUnit}; it was read as ${outcome.unit}, as --unit asks.\n`);
    terminal.talk(`Wrote ${text('out')} and ${outcome.marks}.\n`);
    return EXIT.clear;
  },
};

function wrongOptions(options: Readonly<Record<string, unknown>>): string[] {
  const { unit, up, merge } = options;
  return [
    ...(unit === undefined || LENGTH_UNITS.includes(unit as LengthUnit)
      ? []
      : [`--unit is "${unit}": give one of ${LENGTH_UNITS.join(', ')}`]),
    ...(up === undefined || up === 'y' || up === 'z' ? [] : [`--up is "${up}": give y or z`]),
    ...(merge === undefined || (String(merge).trim() !== '' && Number(merge) >= 0 && Number.isFinite(Number(merge)))
      ? []
      : [`--merge is "${merge}": give a length in mm, 0 or more`]),
  ];
}
