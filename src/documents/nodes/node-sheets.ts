import { angleBetween } from '../../maths/vec3.js';
import type { ForceDiagram, NodePolyhedron } from '../../model/force-diagram.js';
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
import {
  drawHubPicture,
  type HubPicture,
  hubPicture,
  hubPictureHeight,
  hubPictureScale,
  outsideCamera,
} from './hub-picture.js';
import { drawForcePolyhedron } from './polyhedron-picture.js';

/** Width of one picture and its greatest height, mm. */
const PICTURE = 52;
/** Width of the tables beside two and beside three pictures, mm. */
const TABLES = { two: 84, three: 77 } as const;
/** Head of a block: the node's mark, read across a bench. */
const HEAD = 10;
const TEXT = 7.5;
const ANGLE_ROW = lineHeight(TEXT) * 1.06;
/** Between blocks, down and across, mm. */
const GAP = { down: 2.5, across: 10 } as const;
/** Sheets wider than this carry two columns of blocks, mm. */
const TWO_COLUMNS = 380;

/** node-sheets.pdf: a block a node with its mark, two pictures, its sockets and the angles between them. */
export async function nodeSheets(records: PackRecords, fonts: Fonts): Promise<Written> {
  const units = unitsOf(records.job, 0);
  const paper = new Paper(issueOf(records, fonts), 'Node sheets', CAUTION, units.words);
  const cuts = new Map(records.parts.struts.map((s) => [s.mark, s.cutLength]));
  let area = paper.addSheet({
    title: 'Nodes',
    instruction:
      'Hold the printed node as in its picture and check each socket’s mark before gluing. Azimuth: anticlockwise from x in plan; elevation: up from level; setback: from the node to the stop; depth: from the stop to the mouth.',
  });
  const diagram = records.reciprocal?.diagram ?? null;
  const polyhedra = new Map((diagram?.nodes ?? []).map((node) => [node.mark, node]));
  const columns = area.width > TWO_COLUMNS ? 2 : 1;
  const width = (area.width - (columns - 1) * GAP.across) / columns;
  const hubs = [...records.parts.hubs].sort((a, b) => byMark(a.mark, b.mark));
  let y = area.y;
  for (let i = 0; i < hubs.length; i += columns) {
    const row = hubs.slice(i, i + columns).map((hub) => blockOf(hub, polyhedra.get(hub.mark) ?? null, width));
    const height = Math.max(...row.map((block) => block.height));
    if (y + height > area.y + area.height && y > area.y) {
      area = paper.continueSheet();
      y = area.y;
    }
    row.forEach((block, k) => {
      drawBlock(paper.pen, { x: area.x + k * (width + GAP.across), y, width, height }, block, cuts, units, diagram);
    });
    y += height + GAP.down;
  }
  return paper.finish();
}

/** One node's block, measured. */
interface Block {
  readonly hub: HubPart;
  readonly polyhedron: NodePolyhedron | null;
  readonly pictures: readonly { readonly name: string; readonly picture: HubPicture }[];
  readonly pictureWidth: number;
  readonly pictureHeight: number;
  /** One scale for both pictures, so that they can be compared. */
  readonly scale: { readonly factor: number; readonly name: string };
  readonly height: number;
}

function blockOf(hub: HubPart, polyhedron: NodePolyhedron | null, width: number): Block {
  const pictureWidth = Math.min(PICTURE, polyhedron ? (width - TABLES.three) / 3 : (width - TABLES.two) / 2);
  const pictures = [outsideCamera(hub.outward), { ...PLAN, name: 'From above' }].map((camera) => ({
    name: camera.name,
    picture: hubPicture(hub, camera),
  }));
  const scale = pictures
    .map(({ picture }) => hubPictureScale(picture, pictureWidth, PICTURE))
    .reduce((a, b) => (b.factor < a.factor ? b : a));
  const pictureHeight = Math.max(...pictures.map(({ picture }) => hubPictureHeight(picture, scale.factor)));
  const n = hub.sockets.length;
  const tables = smallTableHeight(n, 2, TEXT) + (n > 1 ? 4 + n * ANGLE_ROW : 0);
  return {
    hub,
    polyhedron,
    pictures,
    pictureWidth,
    pictureHeight,
    scale,
    height: HEAD + Math.max(pictureHeight + 5, tables) + 1,
  };
}

function drawBlock(
  pen: Pen,
  area: Area,
  block: Block,
  cuts: ReadonlyMap<string, number | null>,
  units: Units,
  diagram: ForceDiagram | null,
): void {
  const { x, y, width } = area;
  const { hub, pictureWidth, pictureHeight } = block;
  pen.line([x, y], [x + width, y], { width: LINE.hair });
  const wide = pen.text(hub.mark, x, y + 8.2, { size: 24, bold: true });
  const said = [
    ...(hub.makeable ? [] : ['cannot be made: see the report']),
    `at ${hub.at.map((c) => units.length(c)).join(', ')} ${units.lengthUnit}`,
    `${hub.sockets.length} struts`,
    ...(hub.mass === null
      ? []
      : [units.massUnit === 'kg' ? `${fixed(hub.mass * 1000, 0)} g` : `${units.mass(hub.mass)} lb`]),
    hub.material.title,
    `revision ${hub.revision}`,
  ];
  writeFitted(pen, said.join(' · '), x + wide + 5, y + 7.6, width - wide - 5, { size: SIZE.body }, 6.5);
  const top = y + HEAD;
  block.pictures.forEach(({ name, picture }, k) => {
    const box: Area = { x: x + k * (pictureWidth + 1), y: top, width: pictureWidth, height: pictureHeight };
    if (hub.sockets.length > 0) drawHubPicture(pen, box, picture, block.scale.factor);
    const caption = hub.sockets.length > 0 ? `${name}, ${block.scale.name}` : name;
    pen.text(caption, box.x + pictureWidth / 2, top + pictureHeight + 3, {
      size: SIZE.note,
      align: 'centre',
      colour: INK.grey,
    });
  });
  if (diagram && block.polyhedron) {
    const box: Area = { x: x + 2 * (pictureWidth + 1), y: top, width: pictureWidth, height: pictureHeight };
    drawForcePolyhedron(pen, box, diagram, block.polyhedron, outsideCamera(hub.outward));
    const closure = Math.hypot(...block.polyhedron.closure);
    pen.text(
      `Forces, closed to ${closure < 0.001 ? '0.001' : fixed(closure, 3)} N`,
      box.x + pictureWidth / 2,
      top + pictureHeight + 3,
      {
        size: SIZE.note,
        align: 'centre',
        colour: INK.grey,
      },
    );
  }
  const left = x + (block.polyhedron ? 3 : 2) * (pictureWidth + 1) + 1;
  const end = drawSmallTable(pen, left, top - 2, x + width - left, socketColumns(cuts, units), hub.sockets, TEXT);
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

/** The angles of all pairs in degrees: each row against the struts that stand at the heads of the columns. */
function drawAngles(pen: Pen, x: number, y: number, width: number, sockets: readonly Socket[]): void {
  const mark = Math.max(
    pen.widthOf('Angles, °', { size: SIZE.note }),
    ...sockets.map((s) => pen.widthOf(s.strut, { size: TEXT, bold: true })),
  );
  const widest = Math.max(
    pen.widthOf('180.0', { size: TEXT }),
    ...sockets.map((s) => pen.widthOf(s.strut, { size: TEXT, bold: true })),
  );
  const step = Math.min((width - mark) / Math.max(1, sockets.length - 1), widest + 4);
  const size = Math.min(TEXT, (TEXT * (step - 1)) / widest);
  const column = (k: number): number => x + mark + step * (k + 1);
  pen.text('Angles, °', x, y + 3, { size: SIZE.note, colour: INK.grey });
  sockets.forEach((socket, i) => {
    const baseline = y + 3 + i * ANGLE_ROW;
    if (i > 0) pen.text(socket.strut, x, baseline, { size: TEXT, bold: true });
    for (let k = 0; k < i; k++)
      pen.text(fixed((angleBetween(socket.direction, sockets[k]!.direction) * 180) / Math.PI, 1), column(k), baseline, {
        size,
        align: 'right',
      });
    if (i < sockets.length - 1) pen.text(socket.strut, column(i), baseline, { size, bold: true, align: 'right' });
  });
}
