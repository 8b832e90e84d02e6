import { CUBE_FACES } from '../../detailing/systems/cube-faces.js';
import { cubeHalf } from '../../detailing/systems/drilled-cube.js';
import type { HubPart } from '../../model/parts.js';
import { fitText } from '../kit/fit-text.js';
import type { Point } from '../kit/geometry2.js';
import { INK, SIZE } from '../kit/ink.js';
import type { Pen } from '../kit/pen.js';
import { fixed } from '../kit/units.js';
import { drawCubeFace, LEAST_TILT } from './cube-face-picture.js';
import { cubeSetting } from './cube-setting.js';
import { boxRound, ROUND, sizeOf, type Template, title, WORDS } from './template.js';

/** Height of a line that says how one bore is drilled, mm. */
const ROW = 3.6;
/** Columns and rows of the net: four sides in a row, the top over the second and the bottom under it. */
const NET: readonly (readonly [number, number])[] = [
  [0, 1],
  [1, 1],
  [2, 1],
  [3, 1],
  [1, 0],
  [1, 2],
];

/** The six faces of a cube unfolded at full size; where the sheet is too small for them, each drilled face by itself. */
export function cubeTemplate(hub: HubPart): Template | null {
  const edge = 2 * cubeHalf(hub);
  if (!(edge > 0)) return null;
  const drilled = CUBE_FACES.map((_, i) => i).filter((i) => boresOn(hub, i).length > 0);
  const net = facesTemplate(
    hub,
    edge,
    NET.map(([column, row], face) => ({ face, at: [column * edge, row * edge] })),
    '',
  );
  return {
    ...net,
    parts: drilled.map((face) => facesTemplate(hub, edge, [{ face, at: [0, 0] }], ` ${CUBE_FACES[face]!.name}`)),
  };
}

const boresOn = (hub: HubPart, face: number) =>
  hub.sockets.filter((s) => cubeSetting(hub, s).face === CUBE_FACES[face]);

/** Faces with their lower right neighbours' edges shared, each at its top left corner, and a line for every bore on them under it. */
function facesTemplate(
  hub: HubPart,
  edge: number,
  faces: readonly { readonly face: number; readonly at: Point }[],
  of: string,
): Template {
  const corners = faces.flatMap(({ at: [x, y] }): Point[] => [
    [x, y],
    [x + edge, y + edge],
  ]);
  const box = boxRound(corners, ROUND);
  const bores = faces.flatMap(({ face }) => boresOn(hub, face));
  const size = sizeOf(box);
  return {
    width: size.width,
    height: size.height + ROW * bores.length,
    draw(pen, x, y) {
      title(pen, hub.mark, `cube ${fixed(edge, 0)} mm${of}`, x, y, box);
      for (const { face, at } of faces) {
        const corner: Point = [x - box.left + at[0], y + WORDS.over - box.top + at[1]];
        drawCubeFace(
          pen,
          corner,
          edge,
          CUBE_FACES[face]!,
          boresOn(hub, face).map((s) => ({ strut: s.strut, ...cubeSetting(hub, s) })),
        );
      }
      bores.forEach((s, i) => {
        const at = cubeSetting(hub, s);
        const lean =
          at.tilt < LEAST_TILT ? 'square to the face' : `tilt ${fixed(at.tilt, 1)}°, turn ${fixed(at.turn, 1)}°`;
        const words = `${s.strut} on ${at.face.name}: ${lean}, Ø ${fixed(s.bore as number, 1)}, ${fixed(s.depth, 1)} deep`;
        line(pen, words, x, y + WORDS.over + box.height + 3 + ROW * i, box.width);
      });
    },
  };
}

function line(pen: Pen, words: string, x: number, y: number, width: number): void {
  const fitted = fitText(pen, words, width, { size: SIZE.note }, 5);
  pen.text(fitted.text, x, y, { size: fitted.size, colour: INK.black });
}
