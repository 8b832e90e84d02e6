import { fitText, writeFitted } from '../kit/fit-text.js';
import type { Fonts } from '../kit/fonts.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import type { Written } from '../kit/paper.js';
import { capHeight, Pen } from '../kit/pen.js';
import { drawQr } from '../kit/qr.js';
import { type Units, unitsOf } from '../kit/units.js';
import { type MemberRow, memberRows } from '../member-rows.js';
import type { PackRecords } from '../records.js';
import { LABEL_SHEETS, type LabelSheet } from './label-sheets.js';

/** labels.pdf: two labels a strut, one an end, in the order of sawing, on the job's label sheet. */
export async function labelsPdf(records: PackRecords, fonts: Fonts): Promise<Written> {
  const { job } = records;
  const sheet = LABEL_SHEETS[job.output.labels];
  const units = unitsOf(job, 0);
  const pen = new Pen({
    fonts,
    title: `${job.title}: labels`,
    author: job.drawnBy === '' ? job.owner : job.drawnBy,
    subject: `${job.number} revision ${job.revision}`.trim(),
    date: job.date,
  });
  const rows = inSawingOrder(records);
  const perSheet = sheet.across * sheet.down;
  const ends = rows.flatMap((row) => [
    { row, end: 0 as const },
    { row, end: 1 as const },
  ]);
  if (ends.length === 0) pen.addSheet(sheet.width, sheet.height);
  ends.forEach(({ row, end }, i) => {
    const at = i % perSheet;
    if (at === 0) pen.addSheet(sheet.width, sheet.height);
    const x = sheet.left + (at % sheet.across) * sheet.pitch[0];
    const y = sheet.top + Math.floor(at / sheet.across) * sheet.pitch[1];
    drawLabel(pen, x, y, sheet, { row, end, revision: job.revision, held: records.hold.length > 0 }, units);
  });
  return { bytes: await pen.finish(), sheets: pen.sheets, placed: pen.placed };
}

function inSawingOrder(records: PackRecords): MemberRow[] {
  const rows = memberRows(records);
  const place = new Map<string, number>();
  for (const bar of records.stock?.bars ?? []) for (const cut of bar.cuts) place.set(cut.mark, place.size);
  const last = rows.length;
  return rows
    .map((row, i) => ({ row, i }))
    .sort((a, b) => (place.get(a.row.member.mark) ?? last) - (place.get(b.row.member.mark) ?? last) || a.i - b.i)
    .map(({ row }) => row);
}

interface LabelText {
  readonly row: MemberRow;
  readonly end: 0 | 1;
  readonly revision: string;
  readonly held: boolean;
}

/** From the label's edge, mm: a printer's white edge and a sheet laid in askew. */
const INSET = { x: 5, y: 3 } as const;

function drawLabel(
  pen: Pen,
  x: number,
  y: number,
  sheet: LabelSheet,
  { row, end, revision, held }: LabelText,
  units: Units,
): void {
  const { width, height } = sheet.label;
  const [left, top, bottom] = [x + INSET.x, y + INSET.y, y + height - INSET.y];
  const side = Math.min(height - 2 * INSET.y, 22);
  drawQr(pen, row.member.mark, x + width - INSET.x - side + 1.5, y + (height - side) / 2, side);
  const room = width - 2 * INSET.x - side;
  const tall = height > 30;
  const size = tall ? 24 : 17;
  const mark = fitText(pen, row.member.mark, room, { size, bold: true }, 9);
  const markLine = top + capHeight(size);
  pen.text(mark.text, left, markLine, { size: mark.size, bold: true });
  const here = row.member.ends[end]!;
  const far = row.member.ends[1 - end]!;
  const nodeLine = markLine + (tall ? 8.6 : 6);
  // This end's node in its circle, the strut as a line, the far end's node after it.
  const node = fitText(pen, here, room * 0.45, { size: SIZE.head, bold: true }, SIZE.note);
  const box = { width: Math.max(pen.widthOf(node.text, { size: node.size, bold: true }) + 3.2, 6), height: 6 };
  const centre = nodeLine - capHeight(node.size) / 2;
  pen.pill({ x: left + box.width / 2, y: centre, ...box, angle: 0 }, { width: LINE.normal });
  pen.text(node.text, left + box.width / 2, nodeLine, { size: node.size, bold: true, align: 'centre' });
  const stub = left + box.width;
  pen.line([stub, centre], [stub + 5, centre], { width: LINE.strong });
  writeFitted(pen, far, stub + 6.2, nodeLine, room - box.width - 6.2, { size: SIZE.body, colour: INK.grey }, SIZE.note);
  const length = row.part.cutLength === null ? 'no length' : `${units.cut(row.part.cutLength)} ${units.lengthUnit}`;
  const section = row.part.section?.name ?? row.member.section ?? '';
  const foot = tall ? bottom - 4 : bottom;
  const lengthWidth = tall ? room : room * 0.48;
  writeFitted(pen, length, left, foot, lengthWidth, { size: SIZE.body + 1, bold: true }, SIZE.note);
  const rest = `${section}, rev. ${revision}`;
  if (tall) writeFitted(pen, rest, left, bottom, room, { size: SIZE.note, colour: INK.grey }, 6);
  else writeFitted(pen, rest, left + room * 0.5, foot, room * 0.5, { size: SIZE.note, colour: INK.grey }, 6);
  if (held) {
    const word = 'HOLD';
    const wide = pen.widthOf(word, { size: SIZE.note, bold: true }) + 2;
    const at = x + width - INSET.x - wide;
    pen.rectangle(at, y + 0.8, wide, 3.2, { fill: INK.black });
    pen.text(word, at + 1, y + 3.2, { size: SIZE.note, bold: true, colour: INK.white });
  }
}
