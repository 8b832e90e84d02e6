import { movedRing, type Ring, toPoints, toRing } from '../../maths/polygon/ring.js';
import type { PanelEdge, PanelPart } from '../../model/parts.js';
import type { PlannedSheet } from '../../model/plan.js';
import { CAUTION } from '../cautions.js';
import { issueOf } from '../issue.js';
import type { Fonts } from '../kit/fonts.js';
import type { Area, Point } from '../kit/geometry2.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import { Paper, type Written } from '../kit/paper.js';
import type { Pen } from '../kit/pen.js';
import { sayInUnits } from '../kit/say-in-units.js';
import { type Column, drawTable } from '../kit/table.js';
import { fixed, type Units, unitsOf } from '../kit/units.js';
import type { PackRecords } from '../records.js';
import { sayKerf } from './kerf.js';
import { panelSpot } from './panel-spot.js';
import { drawPanelViews } from './panel-views.js';

/** sheets.pdf: a page a sheet with its panels, pictures of where each panel sits, and every edge in a table. */
export async function sheetsPdf(records: PackRecords, fonts: Fonts): Promise<Written> {
  const units = unitsOf(records.job, 0);
  const paper = new Paper(issueOf(records, fonts), 'Sheets', CAUTION, units.words);
  const panels = new Map(records.parts.panels.map((p) => [p.mark, p]));
  const sheets = records.nesting?.sheets ?? [];
  sheets.forEach((sheet, i) => {
    sheetPage(paper, records, sheet, i, panels, units);
  });
  const made = records.parts.panels.filter((p) => p.outline.length > 0);
  if (made.length > 0) drawPanelViews(paper, records, made);
  edgePages(paper, records.parts.panels, units);
  return paper.finish();
}

function sheetPage(
  paper: Paper,
  records: PackRecords,
  sheet: PlannedSheet,
  index: number,
  panels: ReadonlyMap<string, PanelPart>,
  units: Units,
): void {
  const { output } = records.job;
  const us = output.units === 'US';
  const say = (words: string): string => sayInUnits(words, output);
  const area = paper.addSheet({
    title: say(`Sheet ${index + 1}: ${sheet.material} ${fixed(sheet.thickness, 1)} mm`),
    instruction: `Cut ${sheet.mark}.svg or .dxf from ${sheet.sheet}; measure the 100 mm square first. ${say(sayKerf(records.job.cutter))}. Tick each panel off as it comes from the machine; the engraved side faces out.`,
  });
  const room: readonly [number, number] = [area.width, area.height * PICTURE_SHARE];
  // As large as the page takes it: the picture is for finding a panel, the machine files are to scale.
  const scale = Math.min(room[0] / sheet.width, room[1] / sheet.height, 1);
  const kind = records.job.sheets.find((s) => s.name === sheet.sheet);
  drawSheet(
    paper.pen,
    { x: area.x, y: area.y + 2, width: room[0], height: room[1] },
    sheet,
    kind?.outline,
    panels,
    scale,
  );
  const foot = area.y + 2 + sheet.height * scale + 5;
  paper.pen.text(
    `${sheet.sheet}, ${say(`${fixed(sheet.width, 1)} x ${fixed(sheet.height, 1)} mm`)}, not drawn to scale. ${sheet.placements.length} panels use ${fixed(sheet.yield * 100, 1)} %.`,
    area.x,
    foot,
    { size: SIZE.note, colour: INK.grey },
  );
  const rows = sheet.placements.map((p) => panels.get(p.mark)!).filter((p) => p !== undefined);
  const columns: Column<PanelPart>[] = [
    { head: '', tick: true },
    { head: 'Panel', bold: true, value: (p) => p.mark },
    { head: 'Edges', align: 'right', value: (p) => String(p.edges.length) },
    us
      ? { head: 'Area\nin²', align: 'right', value: (p) => units.area(p.area) }
      : { head: 'Area\nm²', align: 'right', value: (p) => fixed(p.area / 1e6, 4) },
    { head: `Mass\n${units.massUnit}`, align: 'right', value: (p) => (p.mass === null ? '' : units.mass(p.mass)) },
    { head: 'Holes', align: 'right', value: (p) => String(p.holes.length) },
    { head: 'Seat', value: (p) => SEATS[p.seating] },
    { head: 'Held by', wraps: true, value: (p) => say(p.holding) },
  ];
  drawTable(paper, foot + 3, columns, rows);
}

/** Most of a page's height that the picture of a sheet takes. */
const PICTURE_SHARE = 0.55;
const SEATS = { between: 'between the struts', over: 'over the struts', under: 'under the struts' } as const;

function drawSheet(
  pen: Pen,
  area: Area,
  sheet: PlannedSheet,
  outline: readonly (readonly [number, number])[] | undefined,
  panels: ReadonlyMap<string, PanelPart>,
  scale: number,
): void {
  const height = sheet.height * scale;
  const at = ([x, y]: readonly [number, number]): Point => [area.x + x * scale, area.y + height - y * scale];
  const edge = outline ?? [
    [0, 0],
    [sheet.width, 0],
    [sheet.width, sheet.height],
    [0, sheet.height],
  ];
  pen.polygon(edge.map(at), '#f0f0f0', { width: LINE.normal });
  for (const placed of sheet.placements) {
    const panel = panels.get(placed.mark);
    if (!panel) continue;
    const move = (points: readonly (readonly [number, number])[]): Ring =>
      movedRing(toRing(points), (placed.rotation_deg * Math.PI) / 180, placed.x, placed.y);
    const ring = move(panel.outline);
    pen.polygon(toPoints(ring).map(at), INK.white, { width: LINE.thin });
    for (const hole of panel.holes) pen.polyline(toPoints(move(hole)).map(at), { width: LINE.hair }, true);
    drawMark(pen, ring, panel.mark, at, scale);
  }
}

/** The panel's mark, underlined, in the widest room of its outline; as large as fits between notes and heads. */
function drawMark(
  pen: Pen,
  ring: Ring,
  mark: string,
  at: (p: readonly [number, number]) => Point,
  scale: number,
): void {
  const [x, y, clear] = panelSpot(ring, mark);
  const [px, py] = at([x, y]);
  const width = pen.widthOf(mark, { size: 10, bold: true }) / 10;
  const size = Math.min(14, (2 * clear * scale * 0.8) / width);
  if (size < LEAST_TYPE) {
    // No room inside: a hair line leads out of the way of nothing but the sheet's own blank.
    pen.circle(px, py, 0.4, { fill: INK.black });
    pen.text(mark, px + 0.8, py + 0.8, { size: LEAST_TYPE, bold: true });
    return;
  }
  pen.text(mark, px, py + size * 0.12, { size, bold: true, align: 'centre' });
  const half = (width * size) / 2;
  pen.line([px - half, py + size * 0.12 + 0.7], [px + half, py + size * 0.12 + 0.7], { width: LINE.normal });
}

const LEAST_TYPE = 5;

interface EdgeRow {
  readonly panel: PanelPart;
  readonly edge: PanelEdge;
}

function edgePages(paper: Paper, panels: readonly PanelPart[], units: Units): void {
  const rows = panels.flatMap((panel) => panel.edges.map((edge): EdgeRow => ({ panel, edge })));
  if (rows.length === 0) return;
  const degrees = (rad: number | null): string => (rad === null ? '' : fixed((rad * 180) / Math.PI, 2));
  const area = paper.addSheet({
    title: 'Edges of the panels',
    instruction:
      'One row an edge, anticlockwise seen from outside. Dihedral: the angle between the two panels through the inside. Bevel: from square, outer face larger where positive (cut UNDER), inner face larger where negative (cut at the TOP); the outline is the larger face’s. Inset: from the strut’s axis to the panel.',
  });
  const columns: Column<EdgeRow>[] = [
    { head: 'From', bold: true, value: (r) => r.edge.from },
    { head: 'To', bold: true, value: (r) => r.edge.to },
    { head: 'Strut', bold: true, value: (r) => r.edge.strut ?? 'none' },
    { head: `Length\n${units.lengthUnit}`, align: 'right', grey: true, value: (r) => units.length(r.edge.length) },
    { head: `Inset\n${units.lengthUnit}`, align: 'right', value: (r) => fixed(r.edge.inset, 2) },
    { head: 'Neighbour', value: (r) => r.edge.neighbour ?? '' },
    { head: 'Dihedral\n°', align: 'right', value: (r) => degrees(r.edge.dihedral) },
    { head: 'Bevel\n°', align: 'right', value: (r) => (r.edge.bevel === 0 ? 'square' : degrees(r.edge.bevel)) },
  ];
  drawTable(paper, area.y, columns, rows, { group: (r) => `Panel ${r.panel.mark}` });
}
