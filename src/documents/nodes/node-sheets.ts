import { angleBetween } from '../../maths/vec3.js';
import type { HubPart, Socket } from '../../model/parts.js';
import { CAUTION } from '../cautions.js';
import { issueOf } from '../issue.js';
import { writeFitted } from '../kit/fit-text.js';
import type { Fonts } from '../kit/fonts.js';
import type { Area } from '../kit/geometry2.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import { Paper, type Written } from '../kit/paper.js';
import { lineHeight, type Pen } from '../kit/pen.js';
import { type Column, drawSmallTable, smallTableHeight } from '../kit/table.js';
import { fixed, type Units, unitsOf } from '../kit/units.js';
import { PLAN } from '../kit/view/camera.js';
import { byMark } from '../member-rows.js';
import type { PackRecords } from '../records.js';
import { drawHubPicture, outsideCamera } from './hub-picture.js';

/** Width of one picture, mm. */
const PICTURE = 46;
/** Head of a block: the node's mark, read across a bench. */
const HEAD = 11;
const TEXT = 8;

/** node-sheets.pdf: a block a node with its mark, two pictures, its sockets and the angles between them. */
export async function nodeSheets(records: PackRecords, fonts: Fonts): Promise<Written> {
  const units = unitsOf(records.job, 0);
  const paper = new Paper(issueOf(records, fonts), 'Node sheets', CAUTION, units.words);
  const cuts = new Map(records.parts.struts.map((s) => [s.mark, s.cutLength]));
  let area = paper.addSheet({
    title: 'Nodes',
    instruction:
      'Hold the printed node as in its picture and check each socket’s mark before gluing. Azimuth is anticlockwise from x in plan, elevation is up from level; setback is from the node to the stop, depth from the stop to the mouth.',
  });
  let y = area.y;
  const columns = area.width > 250 ? 2 : 1;
  const width = (area.width - (columns - 1) * 10) / columns;
  let column = 0;
  let bottom = y;
  for (const hub of [...records.parts.hubs].sort((a, b) => byMark(a.mark, b.mark))) {
    const height = blockHeight(hub);
    if (column === columns || (column === 0 && y + height > area.y + area.height && y > area.y)) {
      y = bottom;
      column = 0;
    }
    if (y + height > area.y + area.height && (y > area.y || column > 0)) {
      area = paper.continueSheet();
      y = area.y;
      bottom = y;
      column = 0;
    }
    drawBlock(paper.pen, { x: area.x + column * (width + 10), y, width, height }, hub, cuts, units);
    bottom = Math.max(bottom, y + height + 3);
    column++;
    if (column === columns) {
      y = bottom;
      column = 0;
    }
  }
  return paper.finish();
}

function blockHeight(hub: HubPart): number {
  const n = hub.sockets.length;
  const tables = smallTableHeight(n, 2, TEXT) + (n > 1 ? 5 + n * lineHeight(TEXT) * 1.15 : 0);
  return HEAD + Math.max(PICTURE + 7, tables) + 3;
}

function drawBlock(pen: Pen, area: Area, hub: HubPart, cuts: ReadonlyMap<string, number | null>, units: Units): void {
  const { x, y, width } = area;
  pen.line([x, y], [x + width, y], { width: LINE.hair });
  const wide = pen.text(hub.mark, x, y + 9, { size: 24, bold: true });
  const said = [
    `at ${hub.at.map((c) => units.length(c)).join(', ')} ${units.lengthUnit}`,
    `${hub.sockets.length} struts`,
    ...(hub.mass === null ? [] : [`${fixed(hub.mass * 1000, 0)} g`]),
    hub.material.title,
    `revision ${hub.revision}`,
    ...(hub.makeable ? [] : ['cannot be made: see the report']),
  ];
  writeFitted(pen, said.join(' · '), x + wide + 5, y + 8, width - wide - 5, { size: SIZE.body }, 6.5);
  const top = y + HEAD;
  const cameras = [outsideCamera(hub.outward), { ...PLAN, name: 'From above' }];
  const pictures = Math.min(PICTURE, (width - 86) / 2);
  cameras.forEach((camera, k) => {
    const box: Area = { x: x + k * (pictures + 1), y: top, width: pictures, height: PICTURE };
    const scale = hub.sockets.length > 0 ? drawHubPicture(pen, box, hub, camera) : '';
    pen.text(`${camera.name}${scale ? `, ${scale}` : ''}`, box.x + pictures / 2, top + PICTURE + 4, {
      size: SIZE.note,
      align: 'centre',
      colour: INK.grey,
    });
  });
  const left = x + 2 * pictures + 5;
  const end = drawSmallTable(pen, left, top, x + width - left, socketColumns(cuts, units), hub.sockets, TEXT);
  if (hub.sockets.length > 1) drawAngles(pen, left, end + 2, x + width - left, hub.sockets);
}

function socketColumns(cuts: ReadonlyMap<string, number | null>, units: Units): Column<Socket>[] {
  const degrees = (rad: number): string => fixed((rad * 180) / Math.PI, 1);
  return [
    { head: 'Strut', bold: true, value: (s) => s.strut },
    { head: 'To', bold: true, value: (s) => s.farNode },
    { head: 'Azimuth\n°', align: 'right', value: (s) => degrees(Math.atan2(s.direction[1], s.direction[0])) },
    {
      head: 'Elevation\n°',
      align: 'right',
      value: (s) => degrees(Math.atan2(s.direction[2], Math.hypot(s.direction[0], s.direction[1]))),
    },
    { head: `Setback\n${units.lengthUnit}`, align: 'right', value: (s) => units.length(s.setback) },
    { head: `Depth\n${units.lengthUnit}`, align: 'right', value: (s) => units.length(s.depth) },
    {
      head: `Cut length\n${units.lengthUnit}`,
      align: 'right',
      bold: true,
      value: (s) => units.length(cuts.get(s.strut) ?? null),
    },
  ];
}

/** The angles of all pairs in degrees, a triangle under the struts' marks. */
function drawAngles(pen: Pen, x: number, y: number, width: number, sockets: readonly Socket[]): void {
  const style = { size: TEXT };
  const mark = Math.max(...sockets.map((s) => pen.widthOf(s.strut, { ...style, bold: true })));
  const step = Math.min(
    (width - mark) / Math.max(1, sockets.length - 1),
    Math.max(mark, pen.widthOf('180.0', style)) + 3.5,
  );
  const size = Math.min(TEXT, (TEXT * (step - 1)) / Math.max(mark, pen.widthOf('180.0', style)));
  const row = lineHeight(TEXT) * 1.15;
  const column = (k: number): number => x + mark + step * (k + 1);
  sockets.forEach((socket, i) => {
    const baseline = y + 3 + i * row;
    if (i > 0) pen.text(socket.strut, x, baseline, { size: TEXT, bold: true });
    for (let k = 0; k < i; k++)
      pen.text(fixed((angleBetween(socket.direction, sockets[k]!.direction) * 180) / Math.PI, 1), column(k), baseline, {
        size,
        align: 'right',
      });
    if (i === 0) pen.text('Angles, °', x, baseline, { size: SIZE.note, colour: INK.grey });
    if (i < sockets.length - 1)
      pen.text(socket.strut, column(i), y + 3 + i * row, { size, bold: true, align: 'right' });
  });
}
