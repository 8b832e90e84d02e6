import type { Manifest } from '../../pipeline/manifest.js';
import type { Paint } from './paint.js';

/** What was made, in sentences, counts aligned; the hold, where there is one, last. */
export function sayPack(m: Manifest, out: string, paint: Paint): string {
  const t = m.totals;
  const rows: [string, string][] = [
    [String(t.struts), `struts, ${t.strut_m.toFixed(2)} m, ${t.strut_mass_kg.toFixed(2)} kg`],
    [
      String(t.nodes),
      `nodes, ${(t.printed_volume_mm3 / 1000).toFixed(0)} cm³ printed, ${t.node_mass_kg.toFixed(2)} kg`,
    ],
    [String(t.panels), `panels, ${t.panel_area_m2.toFixed(3)} m², ${t.panel_mass_kg.toFixed(2)} kg`],
    [String(m.files.length + 1), `files in ${out}`],
  ];
  const width = Math.max(...rows.map(([n]) => n.length));
  const held =
    m.hold.length === 0
      ? []
      : [
          '',
          paint('bold', 'On hold:'),
          ...m.hold.map((h) => `  ${h}`),
          ...(m.withheld.length > 0 ? [`Machine files withheld: ${m.withheld.join(', ')}.`] : []),
        ];
  const next =
    m.hold.length > 0
      ? 'Read report.pdf, mend the job or the truss, and make it again.'
      : 'Start with nodes/gauge.stl and report.pdf.';
  return `${[paint('bold', `${m.title}, revision ${m.revision}`), ...rows.map(([n, words]) => `${n.padStart(width)} ${words}`), ...held, '', m.status === 'clear' ? 'Clear.' : m.hold.length > 0 ? '' : 'Flagged: see report.pdf.', next].filter((l, i, all) => l !== '' || all[i - 1] !== '').join('\n')}\n`;
}
