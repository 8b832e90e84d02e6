import type { MaterialRow, SectionRow, ValueRow } from '../../documents/catalogue-rows.js';

/** Sections as a table, materials with their values by source. */
export function sayCatalogue(rows: {
  readonly sections: readonly SectionRow[];
  readonly materials: readonly MaterialRow[];
}): string {
  return [...sectionLines(rows.sections), ...rows.materials.flatMap(materialLines)].join('\n').trimStart().concat('\n');
}

function sectionLines(sections: readonly SectionRow[]): string[] {
  if (sections.length === 0) return [];
  const cells = sections.map((s) => [s.name, sayShape(s), s.material, s.mass_kg_per_m.toPrecision(3)]);
  const head = ['section', 'mm', 'material', 'kg/m'];
  const widths = head.map((h, k) => Math.max(h.length, ...cells.map((c) => c[k]!.length)));
  return [head, ...cells].map((row) =>
    row
      .map((c, k) => c.padEnd(widths[k]!))
      .join('  ')
      .trimEnd(),
  );
}

function sayShape({ shape }: SectionRow): string {
  if (shape.kind === 'round') return `Ø ${short(shape.diameter)}`;
  if (shape.kind === 'tube') return `Ø ${short(shape.diameter)} x ${short(shape.wall)}`;
  return `${short(shape.width)} x ${short(shape.height)}`;
}

/** Values of one source stand together, the source behind them. */
function materialLines(material: MaterialRow): string[] {
  const bySource = new Map<string, ValueRow[]>();
  for (const v of material.values) {
    const key = `${v.source}\n${v.mark}\n${v.verified}`;
    bySource.set(key, [...(bySource.get(key) ?? []), v]);
  }
  return [
    '',
    `${material.name}: ${material.title}${material.hazards.length > 0 ? ` (${material.hazards.join(', ')})` : ''}`,
    ...[...bySource.values()].map((values) => {
      const { source, mark, verified } = values[0]!;
      const said = values.map((v) => `${v.value} ${say(v)}`).join(', ');
      return `  ${said}\n    ${source} [${mark}${verified ? '' : ', unverified'}]`;
    }),
  ];
}

const say = ({ amount, unit }: ValueRow): string =>
  `${typeof amount === 'number' ? short(amount) : amount}${unit ? ` ${unit}` : ''}`;

const short = (value: number): string => String(Number(value.toPrecision(4)));
