import type { AssemblyStep } from '../../model/assembly.js';
import { CAUTION } from '../cautions.js';
import { issueOf } from '../issue.js';
import { wrapText, writeFitted } from '../kit/fit-text.js';
import type { Fonts } from '../kit/fonts.js';
import type { Area } from '../kit/geometry2.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import { Paper, type Written } from '../kit/paper.js';
import { type Units, unitsOf } from '../kit/units.js';
import type { PackRecords } from '../records.js';
import { packingSections } from './packing-sections.js';
import { drawStepPicture, type Standing, type StepParts } from './step-picture.js';
import { howItEnters, sayStep, stepNotes } from './step-words.js';

/** Steps on an upright sheet, so that marks stay legible at arm's length. */
const STEPS_A_SHEET = 3;
const GAP = 4;
/** Share of a block's width that the words take. */
const WORDS = 0.42;

/** assembly.pdf: the steps in order, three on a sheet, new parts strong and what stands faint; then panels, bags, spares and what to mind. */
export async function assemblyPdf(records: PackRecords, fonts: Fonts): Promise<Written> {
  const units = unitsOf(records.job, 0);
  const paper = new Paper(issueOf(records, fonts), 'Order of building', CAUTION, units.words);
  const steps = records.assembly?.steps ?? [];
  const building = steps.filter((s) => s.kind !== 'panel');
  let area = paper.addSheet({
    title: 'Order of building',
    instruction:
      'One step after the other: strong lines are new in the step, faint ones stand already. A triangle is a prop. Tick a step when it holds.',
  });
  const height = (area.height - (STEPS_A_SHEET - 1) * GAP) / STEPS_A_SHEET;
  const seen = new Seen();
  let slot = 0;
  for (const step of building) {
    const lines = linesOf(paper, records, step, units, area.width * WORDS);
    // A step with many words takes the room of two or three: none of its words may be lost.
    const slots = Math.min(STEPS_A_SHEET, Math.ceil((wordsHeight(lines.length) + GAP) / (height + GAP)));
    if (slot + slots > STEPS_A_SHEET) {
      area = paper.continueSheet();
      slot = 0;
    }
    const block = { x: area.x, y: area.y + slot * (height + GAP), width: area.width };
    drawStep(paper, { ...block, height: slots * (height + GAP) - GAP }, records, step, seen, lines);
    slot += slots;
  }
  packingSections(paper, records, units);
  return paper.finish();
}

/** Above the first line of a step, for its number; between two lines, mm. */
const HEAD = 13;
const LINE_PITCH = 4.3;

interface StepLine {
  readonly text: string;
  readonly bold: boolean;
  readonly indent: number;
}

/** What stands and what is propped, as the steps go by. */
class Seen implements Standing {
  readonly nodes = new Set<string>();
  readonly struts = new Set<string>();
  readonly propped = new Set<string>();
  /** Adds a step; gives what of it did not stand before. */
  add(step: AssemblyStep): StepParts {
    const nodes = step.hubs.filter((n) => !this.nodes.has(n));
    const struts = step.struts.map((s) => s.strut).filter((s) => !this.struts.has(s));
    for (const n of nodes) this.nodes.add(n);
    for (const s of struts) this.struts.add(s);
    for (const n of step.release) this.propped.delete(n);
    for (const n of step.props) this.propped.add(n);
    return { nodes: new Set(nodes), struts: new Set(struts) };
  }
}

function drawStep(
  paper: Paper,
  area: Area,
  records: PackRecords,
  step: AssemblyStep,
  seen: Seen,
  lines: readonly StepLine[],
): void {
  const { pen } = paper;
  const fresh = seen.add(step);
  const words = area.width * WORDS;
  pen.line([area.x, area.y], [area.x + area.width, area.y], { width: LINE.hair, colour: INK.grey });
  pen.rectangle(area.x, area.y + 3, 4.5, 4.5, { width: LINE.normal });
  writeFitted(
    pen,
    `Step ${step.number}`,
    area.x + 7,
    area.y + 7.2,
    words - 7,
    { size: SIZE.head, bold: true },
    SIZE.body,
  );
  // Only a step that fills a sheet by itself is ever pressed closer.
  const pitch = Math.min(LINE_PITCH, (area.height - HEAD) / Math.max(1, lines.length));
  const size = SIZE.body * Math.min(1, pitch / LINE_PITCH);
  lines.forEach(({ text, bold, indent }, i) => {
    pen.text(text, area.x + indent, area.y + HEAD + i * pitch, { size, bold });
  });
  drawStepPicture(
    paper,
    { x: area.x + words, y: area.y + 1.5, width: area.width - words, height: area.height - 3 },
    records.topology,
    fresh,
    seen,
  );
}

/** The words of a step, broken to their column. */
function linesOf(paper: Paper, records: PackRecords, step: AssemblyStep, units: Units, width: number): StepLine[] {
  const lines: StepLine[] = [];
  const add = (text: string, bold = false, indent = 0): void => {
    for (const part of wrapText(paper.pen, text, width - 4 - indent, { size: SIZE.body, bold }))
      lines.push({ text: part, bold, indent });
  };
  add(sayStep(step), true);
  const cut = new Map(records.parts.struts.map((s) => [s.mark, s]));
  const ways = new Set(step.struts.map(howItEnters));
  const [common] = step.struts.length > 1 && ways.size === 1 ? ways : [''];
  for (const entry of step.struts) {
    const strut = cut.get(entry.strut)!;
    const how = common ? '' : howItEnters(entry);
    const size = strut.cutLength === null ? 'no length' : `${units.cut(strut.cutLength)} ${units.lengthUnit}`;
    add(`${entry.strut}  ${strut.ends[0].node}–${strut.ends[1].node}  ${size}${how ? `: ${how}` : ''}`, false, 2);
  }
  if (common) add(`All of them: ${common}.`);
  for (const note of stepNotes(step, units)) add(note);
  return lines;
}

/** Height that so many lines of a step take under its number, mm. */
const wordsHeight = (lines: number): number => HEAD + lines * LINE_PITCH;
