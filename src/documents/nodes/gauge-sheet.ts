import { swelling } from '../../detailing/systems/printing.js';
import { materialNamed } from '../../model/catalogue/resolve.js';
import type { Job } from '../../model/job/index.js';
import type { Section } from '../../model/section.js';
import type { ShapedPiece } from '../../model/shaped.js';
import { gaugeClearances, gaugeKind, gaugeSize, gaugeWalls } from '../../shaping/gauge-steps.js';
import { letteringsFor } from '../../shaping/mark-places.js';
import { CAUTION } from '../cautions.js';
import { drawingScale } from '../kit/drawing-scale.js';
import { Flow } from '../kit/flow.js';
import type { Fonts } from '../kit/fonts.js';
import type { Area } from '../kit/geometry2.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import { meshLines, type SeenLine } from '../kit/mesh/mesh-lines.js';
import { type Issue, Paper, type Written } from '../kit/paper.js';
import type { Pen } from '../kit/pen.js';
import { sayInUnits } from '../kit/say-in-units.js';
import { type Column, drawSmallTable, smallTableHeight } from '../kit/table.js';
import { fixed, type Units, unitsOf } from '../kit/units.js';
import { PLAN } from '../kit/view/camera.js';

/** A gauge that was made, and where it is written. */
export interface MadeGauge {
  readonly section: Section;
  readonly piece: Pick<ShapedPiece, 'positions' | 'triangles' | 'box'>;
  readonly file: string;
}

/** What the sheet is drawn from. */
export interface GaugeSource {
  readonly issue: Pick<Issue, 'job'>;
  readonly gauges: readonly MadeGauge[];
  /** File of the kerf comb; null: nothing is cut from sheet. */
  readonly comb: string | null;
}

/** Room for a gauge's picture, mm, and between it and its table. */
const [PICTURE, TALLEST, BESIDE] = [92, 110, 8] as const;

/** gauge.pdf: how to print and read the fit gauge of each section and the kerf comb, with places to tick, and the keys that take the values. */
export async function gaugeSheet({ issue, gauges, comb }: GaugeSource, fonts: Fonts): Promise<Written> {
  const { job } = issue;
  const paper = new Paper(
    { job, fonts, hold: [], notMade: [] },
    'Fit gauge',
    CAUTION,
    job.output.units === 'SI' ? 'mm' : 'in; mm into the job',
  );
  paper.addSheet({
    title: 'Fit gauge',
    instruction:
      'Make these first, on the machines and from the batches that make the rest. Tick what fits, then write the value into the job: every socket and every cut follows it.',
  });
  const flow = new Flow(paper);
  for (const gauge of gauges) printed(flow, paper.pen, gauge, job);
  if (comb !== null) kerf(flow, comb, job);
  return paper.finish();
}

function printed(flow: Flow, pen: Pen, { section, piece, file }: MadeGauge, job: Job): void {
  const spigot = gaugeKind(section, job) === 'spigot';
  const lines = meshLines(piece.positions, piece.triangles, PLAN);
  const scale = drawingScale([piece.box[0], piece.box[1]], [PICTURE, TALLEST], 1);
  const height = piece.box[1] * scale.factor;
  const units = unitsOf(job, 0);
  const customary = units.lengthUnit === 'in';
  const rows = gaugeClearances(section, job).map((c) => ({ c, made: sizeAt(section, job, c, units) }));
  const columns: Column<(typeof rows)[number]>[] = [
    { head: customary ? 'To enter\nmm' : 'Clearance\nmm', align: 'right', bold: true, value: ({ c }) => fixed(c, 2) },
    ...(customary
      ? [{ head: 'Clearance\nin', align: 'right' as const, value: ({ c }: { c: number }) => units.length(c, 2) }]
      : []),
    { head: `${spigot ? 'Spigot' : 'Bore'}\n${units.lengthUnit}`, align: 'right', value: ({ made }) => made },
    { head: 'Lying', tick: true },
    { head: 'Upright', tick: true },
    { head: 'At 45°', tick: true },
  ];
  flow.heading(`${section.name}: ${file}`, height + 12);
  flow.picture(Math.max(height, smallTableHeight(rows.length, 2) + 10) + 6, (area) => {
    drawMesh(pen, area, lines, height, scale.factor);
    pen.text(
      `From above, ${scale.name}; the front row lies, the next is upright, then 45°`,
      area.x,
      area.y + height + 4,
      {
        size: SIZE.note,
        colour: INK.grey,
      },
    );
    const x = area.x + piece.box[0] * scale.factor + BESIDE;
    pen.text(
      `Tick each ${spigot ? 'spigot that goes into the tube' : 'socket that takes the strut'} by hand`,
      x,
      area.y + 3,
      {
        size: SIZE.body,
        bold: true,
      },
    );
    drawSmallTable(pen, x, area.y + 5, area.x + area.width - x, columns, rows);
  });
  const swells = swelling(job, materialNamed(job, section.material), gaugeSize(section, job));
  const measured = `Measure the thickest of the batch across both ways and enter it as sections."${section.name}".measured_mm${customary ? ', in mm (inches × 25.4),' : ''} where it is not the nominal size.`;
  flow.paragraph(
    `Print it as it lies, ${job.nodes.process === 'filament' ? 'with the hubs’ own filament, layer height and speed' : 'in the hubs’ own material and settings'}, and let it cool. ${spigot ? '' : measured} Take the least clearance that was ticked in all three rows: nodes of a truss hold ${spigot ? 'spigots' : 'sockets'} at every angle. Enter it${customary ? ' in mm, as the first column and the gauge itself have it:' : ' as'}`,
  );
  flow.paragraph(`"nodes": { "clearances": { "${section.name}": 0.00 } }`, { bold: true });
  if (swells > 0)
    flow.paragraph(
      `Try it with dry timber. Outdoors ${sayInUnits(`${fixed(swells, 2)} mm`, job.output)} come on top of it in every socket, for ${fixed(job.fit.moistureChange, 0)} % more moisture: they are not in this gauge and not in the value.`,
    );
  const least = gaugeWalls(job)[2]!;
  const letters = letteringsFor(job, 2, least).map((l) => fixed(l.capHeight, 1));
  flow.paragraph(
    `Behind them: walls of ${gaugeWalls(job)
      .map((t) => fixed(t, 2))
      .join(
        ', ',
      )} mm. Where ${fixed(least, 2)} mm did not come out whole, enter a thicker nodes.wall_mm than it was given. Letters ${letters.join(', ')} mm high from the left: enter the least that can be read as nodes.markHeight_mm.`,
  );
}

/** Size of a rung's bore or spigot in words, to 0.01 mm or 0.0001 in. */
function sizeAt(section: Section, job: Job, c: number, units: Units): string {
  const { shape } = section;
  const size = gaugeSize(section, job);
  if (gaugeKind(section, job) === 'spigot') return units.length(size - c, 2);
  return shape.kind === 'rectangle'
    ? `${units.length(shape.width + c, 2)} × ${units.length(shape.height + c, 2)}`
    : units.length(size + c, 2);
}

function drawMesh(pen: Pen, { x, y }: Area, lines: readonly SeenLine[], height: number, factor: number): void {
  for (const [a, b] of lines)
    pen.line([x + a[0] * factor, y + height - a[1] * factor], [x + b[0] * factor, y + height - b[1] * factor], {
      width: LINE.thin,
    });
}

function kerf(flow: Flow, file: string, job: Job): void {
  flow.heading(`Kerf comb: ${file}`, 30);
  flow.paragraph(
    `Cut it once from the job’s own sheet with nothing offset, at the power and speed of the panels. Push the ten pieces together and measure their width over all: kerf = (100 mm − width) / 10${job.output.units === 'SI' ? '. Enter it as' : ', or from a width in inches, kerf = (3.937 in − width) × 2.54: both in mm. Enter it in mm:'}`,
  );
  flow.paragraph('"cutter": { "kerf_mm": 0.00, "kerfMeasured": true }', { bold: true });
  flow.paragraph(
    `Width measured: ______________ ${job.output.units === 'SI' ? 'mm' : 'in or mm'}        Sheet: ______________        Until then ${fixed(job.cutter.kerf_mm, 2)} mm stand${job.cutter.kerfMeasured ? ', measured' : ', not measured'}.`,
  );
}
