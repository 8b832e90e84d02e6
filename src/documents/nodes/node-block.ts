import type { ForceDiagram, NodePolyhedron } from '../../model/force-diagram.js';
import type { HubPart, Socket } from '../../model/parts.js';
import type { WeakestSection } from '../../model/shaped.js';
import { fitText, writeFitted } from '../kit/fit-text.js';
import type { Area } from '../kit/geometry2.js';
import { INK, LINE, SIZE } from '../kit/ink.js';
import type { Pen } from '../kit/pen.js';
import { type Column, drawSmallTable, smallTableHeight } from '../kit/table.js';
import { fixed, NEWTON_PER_LBF, type Units } from '../kit/units.js';
import { PLAN } from '../kit/view/camera.js';
import { angleTableHeight, drawAngleTable, TEXT } from './angle-table.js';
import { cubeSetting } from './cube-setting.js';
import { jigSetting } from './drilling.js';
import {
  drawHubPicture,
  type HubPicture,
  hubPicture,
  hubPictureHeight,
  hubPictureScale,
  outsideCamera,
} from './hub-picture.js';
import { drawForcePolyhedron } from './polyhedron-picture.js';
import { weakestWords } from './weakest-words.js';

/** Width of one picture and its greatest height, mm. */
const PICTURE = 52;
/** Width of the tables beside two and beside three pictures, mm. */
const TABLES = { two: 84, three: 77 } as const;
/** What the jig's settings of a drilled ball take besides, mm. */
const JIG = 21;
/** What the face, its tilt and its turn take besides, mm. */
const CUBE = 28;
/** Head of a block: the node's mark, read across a bench. */
const HEAD = 10;
/** A mark wider than this does not fit into the tables beside the pictures, mm. */
const LONG = 13;
const ANGLES_ELSEWHERE = 5;

/** One node's block, measured. */
export interface Block {
  readonly hub: HubPart;
  /** null: not measured. */
  readonly weakest: WeakestSection | null;
  readonly polyhedron: NodePolyhedron | null;
  readonly pictures: readonly { readonly name: string; readonly picture: HubPicture }[];
  readonly pictureWidth: number;
  readonly pictureHeight: number;
  /** One scale for both pictures, so that they can be compared. */
  readonly scale: { readonly factor: number; readonly name: string };
  /** Marks too long for tables beside the pictures: the tables stand under them. */
  readonly stacked: boolean;
  /** false: so many sockets that the angles would not fit on a sheet. */
  readonly angles: boolean;
  readonly height: number;
}

/** Measures the block of a node in `width` mm on a sheet with `room` mm of height. */
export function blockOf(
  pen: Pen,
  hub: HubPart,
  polyhedron: NodePolyhedron | null,
  width: number,
  room: number,
  weakest: WeakestSection | null = null,
): Block {
  const jig = hub.system === 'drilled-ball' ? JIG : hub.system === 'drilled-cube' ? CUBE : 0;
  const pictureWidth = Math.min(
    PICTURE,
    polyhedron ? (width - TABLES.three - jig) / 3 : (width - TABLES.two - jig) / 2,
  );
  const pictures = [outsideCamera(hub.outward), { ...PLAN, name: 'From above' }].map((camera) => ({
    name: camera.name,
    picture: hubPicture(hub, camera),
  }));
  const scale = pictures
    .map(({ picture }) => hubPictureScale(picture, pictureWidth, PICTURE))
    .reduce((a, b) => (b.factor < a.factor ? b : a));
  const pictureHeight = Math.max(...pictures.map(({ picture }) => hubPictureHeight(picture, scale.factor)));
  const longest = hub.sockets.reduce(
    (most, s) => Math.max(most, ...[s.strut, s.farNode].map((mark) => pen.widthOf(mark, { size: TEXT, bold: true }))),
    0,
  );
  const stacked = longest > LONG;
  const n = hub.sockets.length;
  const heightWith = (tables: number): number =>
    HEAD + (stacked ? pictureHeight + 8 + tables : Math.max(pictureHeight + 5, tables)) + 1;
  const angles = heightWith(smallTableHeight(n, 2, TEXT) + angleTableHeight(n)) <= room;
  return {
    hub,
    weakest,
    polyhedron,
    pictures,
    pictureWidth,
    pictureHeight,
    scale,
    stacked,
    angles,
    height: heightWith(smallTableHeight(n, 2, TEXT) + (angles ? angleTableHeight(n) : ANGLES_ELSEWHERE)),
  };
}

export function drawBlock(
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
  const head = fitText(pen, hub.mark, width * 0.5, { size: 24, bold: true }, SIZE.head);
  const wide = pen.text(head.text, x, y + 8.2, { size: head.size, bold: true });
  const said = [
    ...(hub.makeable ? [] : ['cannot be made: see the report']),
    `at ${hub.at.map((c) => units.length(c)).join(', ')} ${units.lengthUnit}`,
    `${hub.sockets.length} struts`,
    ...(hub.mass === null
      ? []
      : [units.massUnit === 'kg' ? `${fixed(hub.mass * 1000, 0)} g` : `${units.mass(hub.mass)} lb`]),
    hub.material.title,
    `revision ${hub.revision}`,
    ...(block.weakest ? [`least section ${weakestWords(block.weakest, units)}`] : []),
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
    const us = units.lengthUnit === 'in';
    const closure = Math.hypot(...block.polyhedron.closure) / (us ? NEWTON_PER_LBF : 1);
    pen.text(
      `Forces, closed to ${closure < 0.001 ? '0.001' : fixed(closure, 3)} ${us ? 'lbf' : 'N'}`,
      box.x + pictureWidth / 2,
      top + pictureHeight + 3,
      {
        size: SIZE.note,
        align: 'centre',
        colour: INK.grey,
      },
    );
  }
  const left = block.stacked ? x : x + (block.polyhedron ? 3 : 2) * (pictureWidth + 1) + 1;
  const down = block.stacked ? top + pictureHeight + 6 : top - 2;
  const room = x + width - left;
  const end = drawSmallTable(pen, left, down, room, socketColumns(hub, cuts, units), hub.sockets, TEXT);
  if (!block.angles) pen.text('Angles: see bar-angles.csv', left, end + 3.5, { size: SIZE.note, colour: INK.grey });
  else if (hub.sockets.length > 1) drawAngleTable(pen, left, end + 2, room, hub.sockets);
}

function socketColumns(hub: HubPart, cuts: ReadonlyMap<string, number | null>, units: Units): Column<Socket>[] {
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
    ...(hub.system === 'drilled-ball' && hub.sockets.length > 0
      ? [
          { head: 'Jig tilt\n°', align: 'right' as const, value: (s: Socket) => fixed(jigSetting(hub, s).tilt, 1) },
          { head: 'Jig turn\n°', align: 'right' as const, value: (s: Socket) => fixed(jigSetting(hub, s).turn, 1) },
        ]
      : []),
    ...(hub.system === 'drilled-cube' && hub.makeable
      ? [
          { head: 'Face', value: (s: Socket) => cubeSetting(hub, s).face.name },
          { head: 'Tilt\n°', align: 'right' as const, value: (s: Socket) => fixed(cubeSetting(hub, s).tilt, 1) },
          { head: 'Turn\n°', align: 'right' as const, value: (s: Socket) => fixed(cubeSetting(hub, s).turn, 1) },
        ]
      : []),
    { head: `Setback\n${units.lengthUnit}`, align: 'right', value: (s) => units.length(s.setback) },
    { head: `Depth\n${units.lengthUnit}`, align: 'right', value: (s) => units.length(s.depth) },
    {
      head: `Cut length\n${units.lengthUnit}`,
      align: 'right',
      bold: true,
      value: (s) => units.cut(cuts.get(s.strut) ?? null),
    },
  ];
}
