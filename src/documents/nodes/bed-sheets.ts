import { materialNamed } from '../../model/catalogue/resolve.js';
import type { BedItem, PlannedBed } from '../../model/plan.js';
import { CAUTION } from '../cautions.js';
import { issueOf } from '../issue.js';
import { fitText } from '../kit/fit-text.js';
import type { Fonts } from '../kit/fonts.js';
import type { Area, Point } from '../kit/geometry2.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import { Paper, type Written } from '../kit/paper.js';
import { capHeight, type Pen } from '../kit/pen.js';
import { type Column, drawTable } from '../kit/table.js';
import { fixed, type Units, unitsOf } from '../kit/units.js';
import type { PackRecords } from '../records.js';
import { sayDuration } from './duration.js';

/** Most of a sheet's height that a bed's picture takes, and its margin for the words under it, mm. */
const [PICTURE_SHARE, WORDS] = [0.5, 16] as const;
/** Marks are written no smaller than this inside a piece, pt. */
const LEAST_MARK = 5;

/** bed-sheets.pdf: what is printed on which machine, how long it takes and from what that is reckoned, then a sheet a bed. null: nothing is printed. */
export async function bedSheets(records: PackRecords, fonts: Fonts): Promise<Written | null> {
  const beds = records.beds?.beds ?? [];
  if (beds.length === 0) return null;
  const units = unitsOf(records.job, 0);
  const paper = new Paper(issueOf(records, fonts), 'Print beds', CAUTION, units.words);
  overview(paper, records, beds, units);
  for (const bed of beds) bedPage(paper, bed, units);
  return paper.finish();
}

function overview(paper: Paper, records: PackRecords, beds: readonly PlannedBed[], units: Units): void {
  const { job } = records;
  const area = paper.addSheet({
    title: 'Print beds',
    instruction: `Print the fit gauge first. Each bed is one 3MF file with a named object a piece, as it lies: nothing to turn or arrange. Material: ${materialNamed(job, job.nodes.material)?.title ?? job.nodes.material}.`,
  });
  // What goes back into the job stands in the unit of the job's key, whatever the papers are in.
  const inJobUnits = job.output.units === 'SI' ? '' : ', in mm as there';
  const pieces = beds.reduce((sum, bed) => sum + bed.items.length, 0);
  const total = (of: (bed: PlannedBed) => number): number => beds.reduce((sum, bed) => sum + of(bed), 0);
  const columns: Column<PlannedBed>[] = [
    { head: '', tick: true },
    { head: 'Bed', bold: true, value: (b) => b.mark },
    { head: 'Printer', value: (b) => b.printer },
    { head: 'Pieces', align: 'right', value: (b) => String(b.items.length) },
    { head: `Volume\n${units.volumeUnit}`, align: 'right', value: (b) => units.volume(b.volume, 1) },
    { head: `Mass\n${units.massUnit}`, align: 'right', value: (b) => units.mass(b.mass) },
    { head: 'Layers', align: 'right', value: (b) => String(b.layers) },
    { head: 'Time\nabout', align: 'right', bold: true, value: (b) => sayDuration(b.time) },
    { head: 'Flow\nmm³/s', align: 'right', grey: true, value: (b) => fixed(b.flow, 1) },
    { head: 'Layer\nmm', align: 'right', grey: true, value: (b) => fixed(b.layer, 2) },
    { head: 'A layer\nmore, s', align: 'right', grey: true, value: (b) => fixed(b.layerChange, 1) },
  ];
  const y = drawTable(paper, area.y, columns, beds);
  const end = paper.paragraph(
    `${pieces} pieces on ${beds.length} beds: ${units.volume(
      total((b) => b.volume),
      0,
    )} ${units.volumeUnit}, ${units.mass(total((b) => b.mass))} ${units.massUnit}, ${sayDuration(total((b) => b.time))} of printing.`,
    y + 2,
    { bold: true },
  );
  const after = paper.paragraph(
    `Time = volume / flow + layers × change of layer: within about 30 %, since supports, infill, heating and travel are not known here. Flow, layer and change are the printer’s in the job${inJobUnits}; enter what your machine took on a first bed and the rest follows.`,
    end + 1,
  );
  const left = records.beds?.unplaced ?? [];
  if (left.length > 0) paper.paragraph(`On no printer: ${left.join(', ')}.`, after + 1, { bold: true });
}

function bedPage(paper: Paper, bed: PlannedBed, units: Units): void {
  const { pen } = paper;
  const area = paper.addSheet({
    title: bed.mark,
    instruction: `Load nodes/beds/${bed.mark}.3mf on ${bed.printer}. Pieces lie as in the picture, seen from above, the machine’s front below. Tick each off as it comes from the bed.`,
  });
  // As large as the sheet takes it: the picture is for finding a piece.
  const factor = Math.min(area.width / bed.width, (area.height * PICTURE_SHARE - WORDS) / bed.depth, 1);
  const height = bed.depth * factor;
  drawBed(pen, { x: area.x, y: area.y + 1, width: bed.width * factor, height }, bed, factor);
  const foot = area.y + height + 5;
  pen.text(
    `Bed ${units.length(bed.width, 0)} × ${units.length(bed.depth, 0)} ${units.lengthUnit}, not drawn to scale. ${units.volume(bed.volume, 1)} ${units.volumeUnit}, ${units.mass(bed.mass)} ${units.massUnit}.`,
    area.x,
    foot,
    { size: SIZE.note, colour: INK.grey },
  );
  pen.text(
    `About ${sayDuration(bed.time)} = ${fixed(bed.volume, 0)} mm³ / ${fixed(bed.flow, 1)} mm³/s + ${bed.layers} layers × ${fixed(bed.layerChange, 1)} s`,
    area.x,
    foot + 4,
    { size: SIZE.note, colour: INK.grey },
  );
  const columns: Column<BedItem>[] = [
    { head: '', tick: true },
    { head: 'No.', align: 'right', grey: true, value: (i) => String(bed.items.indexOf(i) + 1) },
    { head: 'Piece', bold: true, value: nameOf },
    { head: `Size as it lies\n${units.lengthUnit}`, align: 'right', value: (i) => sizeOf(i, units) },
    { head: `Volume\n${units.volumeUnit}`, align: 'right', value: (i) => units.volume(i.volume, 2) },
    { head: `Mass\n${units.massUnit}`, align: 'right', value: (i) => units.mass(i.mass) },
    { head: `From left\n${units.lengthUnit}`, align: 'right', grey: true, value: (i) => units.length(i.x) },
    { head: `From front\n${units.lengthUnit}`, align: 'right', grey: true, value: (i) => units.length(i.y) },
  ];
  drawTable(paper, foot + 8, columns, bed.items);
}

const nameOf = (item: BedItem): string => (item.piece ? `${item.mark}.${item.piece}` : item.mark);

function sizeOf({ box, turned }: BedItem, units: Units): string {
  const [x, y] = turned ? [box[1], box[0]] : [box[0], box[1]];
  return [x, y, box[2]].map((v) => units.length(v, 0)).join(' × ');
}

function drawBed(pen: Pen, area: Area, bed: PlannedBed, factor: number): void {
  const rim = { width: LINE.strong };
  if (bed.shape === 'circle') pen.circle(area.x + area.width / 2, area.y + area.height / 2, area.width / 2, rim);
  else pen.rectangle(area.x, area.y, area.width, area.height, rim);
  bed.items.forEach((item, i) => {
    const points = item.outline.map(([x, y]): Point => [area.x + x * factor, area.y + area.height - y * factor]);
    pen.polygon(points, '#f0f0f0', { width: LINE.thin });
    const [xs, ys] = [points.map((p) => p[0]), points.map((p) => p[1])];
    const middle: Point = [(Math.min(...xs) + Math.max(...xs)) / 2, (Math.min(...ys) + Math.max(...ys)) / 2];
    const [wide, high] = [Math.max(...xs) - Math.min(...xs) - 1, Math.max(...ys) - Math.min(...ys) - 1];
    writeMark(pen, nameOf(item), i + 1, middle, wide, high);
  });
}

/** The mark along the piece's longer side where it fits, else the piece's number in the table. */
function writeMark(pen: Pen, mark: string, number: number, [x, y]: Point, wide: number, high: number): void {
  const upright = high > wide;
  const style = { size: SIZE.body, bold: true };
  const fitted = fitText(pen, mark, Math.max(wide, high), style, LEAST_MARK);
  const fits = fitted.text === mark && capHeight(fitted.size) < Math.min(wide, high);
  const { text, size } = fits ? fitted : { text: String(number), size: LEAST_MARK };
  const drop = capHeight(size) / 2;
  if (fits && upright) pen.text(text, x + drop, y, { ...style, size, align: 'centre' }, -Math.PI / 2);
  else pen.text(text, x, y + drop, { ...style, size, align: 'centre' });
}
