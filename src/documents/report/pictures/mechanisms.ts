import type { Vec3 } from '../../../maths/vec3.js';
import type { MechanismNote } from '../../../model/solution.js';
import type { Flow } from '../../kit/flow.js';
import type { Paper } from '../../kit/paper.js';
import { ISOMETRIC } from '../../kit/view/camera.js';
import type { ViewArrow } from '../../kit/view/marks/arrow.js';
import { drawTrussView } from '../../kit/view/truss-view.js';
import type { PackRecords } from '../../records.js';
import { type Scene, sceneOf } from './scene.js';
import { largestMovement, SHAPE_HEIGHT } from './shape.js';

/** Mechanisms that are drawn and said in words; the others are counted. */
export const MECHANISMS_SHOWN = 6;
/** Length of the largest arrow, mm on the sheet, and the share of it below which a node counts as still. */
const ARROW = 13;
const STILL = 0.08;

/** Each mechanism of the pin-jointed figure as arrows at the nodes that move, with its words. */
export function mechanismPictures(paper: Paper, flow: Flow, records: PackRecords): void {
  const notes = records.solution?.counts?.mechanismNotes ?? [];
  if (notes.length === 0) return;
  const scene = sceneOf(records);
  notes.slice(0, MECHANISMS_SHOWN).forEach((note, k) => {
    flow.heading(`Mechanism ${k + 1} of ${notes.length}`, SHAPE_HEIGHT + 12);
    flow.paragraph(`${note.words}. Arrows: the way and the share in which each node moves, as a pin-jointed figure.`);
    const arrows = arrowsOf(note, scene);
    const moving = new Set(arrows.map((a) => a.node));
    flow.picture(SHAPE_HEIGHT, (area) => {
      drawTrussView(paper.pen, area, {
        camera: ISOMETRIC,
        scale: 'fill',
        edge: ARROW - 2,
        nodes: scene.nodes.map((node, i) => ({ ...node, show: moving.has(i) ? 'mark' : 'none' })),
        struts: scene.struts.map((s) => ({ ...s, stroke: { kind: 'none' as const } })),
        arrows,
      });
    });
  });
}

function arrowsOf(note: MechanismNote, scene: Scene): ViewArrow[] {
  const most = largestMovement(note.shape)?.size ?? 0;
  return scene.nodes.flatMap((_, i): ViewArrow[] => {
    const direction: Vec3 = [note.shape[3 * i]!, note.shape[3 * i + 1]!, note.shape[3 * i + 2]!];
    const share = Math.hypot(...direction) / most;
    return share > STILL ? [{ node: i, direction, length: ARROW * share, label: '', end: 'from' }] : [];
  });
}
