import type { PlannedBar, SectionPlan } from '../../model/plan.js';
import { CAUTION } from '../cautions.js';
import { issueOf } from '../issue.js';
import { fitText, wrapText } from '../kit/fit-text.js';
import { Flow } from '../kit/flow.js';
import type { Fonts } from '../kit/fonts.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import { Paper, type Written } from '../kit/paper.js';
import { lineHeight, type Pen } from '../kit/pen.js';
import type { Column } from '../kit/table.js';
import { fixed, type Units, unitsOf } from '../kit/units.js';
import type { PackRecords } from '../records.js';
import { type BarBatch, barBatches } from './bar-batches.js';
import { BAR_HEIGHT, drawBar } from './bar-drawing.js';
import { type BuyingLine, buyingLines } from './buying-list.js';
import { sayProof } from './proof.js';

/** What a saw plan draws on: a pack's records, or those of pieces that belong to no truss. */
export type SawRecords = Pick<PackRecords, 'job' | 'stock' | 'hold' | 'findings'>;

/** saw-plan.pdf: the bars to fetch, then every bar to scale with its cuts in sawing order, equal bars together. */
export async function sawPlanPdf(records: SawRecords, fonts: Fonts): Promise<Written> {
  const { job } = records;
  const plan = records.stock;
  const units = unitsOf(job, 0);
  const paper = new Paper(issueOf(records, fonts), 'Saw plan', CAUTION, units.words);
  const { endTrim_mm: trim, trimEnds } = job.saw;
  const square =
    trim > 0 && trimEnds > 0
      ? `Square ${trimEnds === 2 ? 'both ends' : 'one end'} of a new bar first: ${units.length(trim)} ${units.lengthUnit} off, blade included. `
      : '';
  paper.addSheet({
    title: 'Saw plan',
    instruction: `${square}Saw from the left, longest first; set the stop to the bold length and leave it for all pieces of that length. Blade ${units.length(job.saw.kerf_mm)} ${units.lengthUnit}. Tick each bar when it is sawn and its pieces are marked.`,
  });
  const flow = new Flow(paper);
  if (!plan || plan.bars.length === 0) {
    flow.paragraph('No strut has a cut length, so there is nothing to saw. The report says why.');
    return paper.finish();
  }
  fetchTable(flow, buyingLines(plan.bars), plan.cost, job.stock.currency, units);
  for (const section of plan.sections) {
    const bars = plan.bars.filter((b) => b.section === section.section);
    if (bars.length === 0) continue;
    flow.heading(headingOf(section), 45);
    flow.paragraph(sayProof(section, job.stock.currency));
    const scale = paper.room.width / Math.max(...bars.map((b) => b.length));
    for (const batch of barBatches(bars, units.cut)) drawBatch(flow, paper, batch, scale, records, units);
  }
  return paper.finish();
}

function fetchTable(flow: Flow, lines: readonly BuyingLine[], cost: number, currency: string, units: Units): void {
  flow.heading('Bars to fetch');
  const money = `${currency === '' ? '' : `, ${currency}`}`;
  const columns: Column<BuyingLine>[] = [
    { head: 'Fetched', tick: true },
    { head: 'Quantity', align: 'right', bold: true, value: (l) => String(l.quantity) },
    { head: `Length, ${units.lengthUnit}`, align: 'right', bold: true, value: (l) => units.length(l.length) },
    { head: 'Section', bold: true, value: (l) => l.section },
    { head: 'Stock', value: (l) => l.stock },
    { head: 'From', value: (l) => (l.fromRack ? 'rack' : 'shop') },
    { head: `Price each${money}`, align: 'right', value: (l) => (l.fromRack ? '' : fixed(l.each, 2)) },
    { head: `Price${money}`, align: 'right', value: (l) => (l.fromRack ? '' : fixed(l.price, 2)) },
  ];
  flow.table(columns, lines);
  const unit = currency === '' ? '' : ` ${currency}`;
  const price = lines.reduce((sum, l) => sum + l.price, 0);
  const credit = price - cost;
  flow.paragraph(
    `In all ${fixed(price, 2)}${unit} for bars from the shop${credit > 0.005 ? `; the offcuts kept are worth ${fixed(credit, 2)}${unit} of that` : ''}.`,
  );
}

const headingOf = (s: SectionPlan): string => `${s.section}: ${s.bars} ${s.bars === 1 ? 'bar' : 'bars'}`;

const TICK = 3.2;
const LINE_GAP = 1.2;

function drawBatch(flow: Flow, paper: Paper, batch: BarBatch, scale: number, records: SawRecords, units: Units): void {
  const { pen } = paper;
  const bar = batch.bars[0]!;
  const { saw } = records.job;
  const width = paper.room.width;
  const settings = batch.settings.map((s) => `${s.times > 1 ? `${s.times} x ` : ''}${units.cut(s.length)}`).join('   ');
  const settingLines = wrapText(pen, settings, width - 24, { size: SIZE.head, bold: true });
  const marks = batch.bars.map((b) => ({
    bar: b,
    lines: wrapText(pen, b.cuts.map((c) => c.mark).join('  '), width - MARK_ROOM, { size: SIZE.body }),
  }));
  const clamp = sayClamp(bar, saw.leastClamped_mm, units);
  const head = settingLines.length * lineHeight(SIZE.head) + 5;
  const body = marks.reduce((sum, m) => sum + m.lines.length * lineHeight(SIZE.body) + LINE_GAP, 0);
  const drawn = head + BAR_HEIGHT + 3 + (clamp ? lineHeight(SIZE.body) : 0);
  // A batch of very many bars goes on over the sheet: the picture first, then its bars in portions.
  const portion = Math.max(20, paper.room.height - drawn - 10);
  const whole = body <= portion;
  flow.picture(drawn + (whole ? body : 0), (area) => {
    let y = area.y + lineHeight(SIZE.head) * 0.8;
    const times = batch.bars.length > 1 ? `x ${batch.bars.length}` : '';
    pen.text(times, area.x + width, y, { size: SIZE.head, bold: true, align: 'right' });
    for (const line of settingLines) {
      pen.text(line, area.x, y, { size: SIZE.head, bold: true });
      y += lineHeight(SIZE.head);
    }
    const from = `${bar.fromRack ? `rack ${bar.stock.replace(/^rack /, '')}` : bar.stock}, ${units.length(bar.length)} ${units.lengthUnit} long`;
    const fitted = fitText(pen, from, width, { size: SIZE.note }, SIZE.note);
    pen.text(fitted.text, area.x, y - 0.6, { size: SIZE.note, colour: INK.grey });
    y += 2.2;
    const ends = bar.fromRack ? 0 : saw.trimEnds;
    drawBar(
      pen,
      area.x,
      y,
      scale,
      { bar, kerf: saw.kerf_mm, trim: [ends > 0 ? saw.endTrim_mm : 0, ends > 1 ? saw.endTrim_mm : 0] },
      units,
    );
    y += BAR_HEIGHT + 4.6;
    if (clamp) {
      pen.text(clamp, area.x, y, { size: SIZE.body, bold: true });
      y += lineHeight(SIZE.body);
    }
    if (whole) for (const m of marks) y = writeMarks(pen, area.x, y, m);
  });
  if (whole) return;
  for (const m of marks) {
    flow.picture(m.lines.length * lineHeight(SIZE.body) + LINE_GAP - 3, (area) => {
      writeMarks(pen, area.x, area.y + lineHeight(SIZE.body) * 0.8, m);
    });
  }
}

/** What a row of marks starts with: tick and the bar's mark, mm. */
const MARK_ROOM = 22;

function writeMarks(
  pen: Pen,
  x: number,
  y: number,
  { bar, lines }: { readonly bar: PlannedBar; readonly lines: readonly string[] },
): number {
  pen.rectangle(x, y - TICK + 0.4, TICK, TICK, { width: LINE.thin });
  const mark = fitText(pen, bar.mark, MARK_ROOM - TICK - 3, { size: SIZE.body, bold: true }, SIZE.note);
  pen.text(mark.text, x + TICK + 1.8, y, { size: mark.size, bold: true });
  let at = y;
  for (const line of lines) {
    pen.text(line, x + MARK_ROOM, at, { size: SIZE.body });
    at += lineHeight(SIZE.body);
  }
  return at + LINE_GAP;
}

/** A warning where a piece, or what is held at the last cut, is too short for a hand. */
function sayClamp(bar: PlannedBar, least: number, units: Units): string | undefined {
  const short = bar.cuts.filter((c) => c.length < least).length;
  const held = bar.offcut > 0 && bar.offcut < least;
  if (short === 0 && !held) return undefined;
  const parts: string[] = [];
  if (short > 0)
    parts.push(
      short === bar.cuts.length ? 'every piece' : short === 1 ? 'the shortest piece' : `the last ${short} pieces`,
    );
  if (held) parts.push(`the rest of ${units.length(bar.offcut)} ${units.lengthUnit} at the last cut`);
  return `Clamp ${parts.join(' and ')}: too short to hold by hand.`;
}
