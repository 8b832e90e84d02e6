import { addScaled, type Vec3 } from '../../../maths/vec3.js';
import type { Flow } from '../../kit/flow.js';
import type { Paper } from '../../kit/paper.js';
import { ISOMETRIC } from '../../kit/view/camera.js';
import { drawTrussView } from '../../kit/view/truss-view.js';
import type { PackRecords } from '../../records.js';
import { sceneOf } from './scene.js';

/** Share of the truss's size that the largest movement is drawn as. */
const SHOWN = 0.08;
/** Height of one picture, mm: two a sheet. */
export const SHAPE_HEIGHT = 92;

/** The largest movement in a field of 3 numbers a node, and its node's index; null for a field without movement. */
export function largestMovement(field: Float64Array): { readonly node: number; readonly size: number } | null {
  let [node, size] = [-1, 0];
  for (let i = 0; 3 * i < field.length; i++) {
    const moved = Math.hypot(field[3 * i]!, field[3 * i + 1]!, field[3 * i + 2]!);
    if (moved > size) [node, size] = [i, moved];
  }
  return node < 0 ? null : { node, size };
}

/** The factor, 1, 2 or 5 times a power of ten, by which a movement is drawn so that it can be seen. */
export function exaggeration(largest: number, size: number): number {
  const wanted = (SHOWN * size) / largest;
  const power = 10 ** Math.floor(Math.log10(wanted));
  const share = wanted / power;
  return power * (share >= 5 ? 5 : share >= 2 ? 2 : 1);
}

/** Draws the truss moved by `factor` times the field, black, over the truss at rest, thin. */
export function shapePicture(
  paper: Paper,
  flow: Flow,
  records: PackRecords,
  field: Float64Array,
  factor: number,
): void {
  const { nodes, struts } = sceneOf(records);
  const count = nodes.length;
  const moved = nodes.map((node, i) => {
    const by: Vec3 = [field[3 * i]!, field[3 * i + 1]!, field[3 * i + 2]!];
    return { mark: `${node.mark} moved`, at: addScaled(node.at, by, factor), show: 'none' as const };
  });
  flow.picture(SHAPE_HEIGHT, (area) => {
    drawTrussView(paper.pen, area, {
      camera: ISOMETRIC,
      scale: 'fill',
      marks: 'own',
      nodes: [...nodes, ...moved],
      struts: [
        ...struts.map((strut) => ({ ...strut, stroke: { kind: 'faint' as const } })),
        ...struts.map((strut) => ({
          ...strut,
          mark: `${strut.mark} moved`,
          from: strut.from + count,
          to: strut.to + count,
          stroke: { kind: 'plain' as const, width: 0.5 },
        })),
      ],
    });
  });
}
