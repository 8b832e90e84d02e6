import { drawingScale } from '../drawing-scale.js';
import type { Area } from '../geometry2.js';
import { SIZE } from '../ink.js';
import type { Pen } from '../pen.js';
import { type Camera, FRONT, ISOMETRIC, LEFT, PLAN, project, RIGHT } from './camera.js';
import { drawTrussView, type TrussView } from './truss-view.js';

export interface ProjectedViews {
  readonly nodes: TrussView['nodes'];
  readonly struts: TrussView['struts'];
  readonly method: 'first-angle' | 'third-angle';
}

/** Room round each view for its marks, mm. */
const ROUND = 7;
const CAPTION = 6;

/**
 * Draws front elevation, side elevation and plan where the method of projection puts them, at one scale of ISO 5455, and
 * the isometric view in the corner left free. First angle (ISO 5456-2): the view from the left stands on the right, the
 * plan below; third angle: the view from the right stands on the right, the plan above.
 */
export function drawProjectedViews(pen: Pen, area: Area, views: ProjectedViews): void {
  const first = views.method === 'first-angle';
  const side = first ? LEFT : RIGHT;
  const [front, lateral, plan] = [FRONT, side, PLAN].map((camera) => extent(camera, views.nodes)) as [Size, Size, Size];
  const room: Size = [area.width - 4 * ROUND, area.height - 4 * ROUND - 2 * CAPTION];
  const scale = drawingScale([front[0] + lateral[0], front[1] + plan[1]], room);
  const grow = (room[0] - scale.factor * (front[0] + lateral[0])) / 2;
  const tall = (room[1] - scale.factor * (front[1] + plan[1])) / 2;
  const left = scale.factor * front[0] + 2 * ROUND + grow;
  const frontHeight = scale.factor * front[1] + 2 * ROUND + tall + CAPTION;
  const planHeight = area.height - frontHeight;
  const [frontY, planY] = first ? [area.y, area.y + frontHeight] : [area.y + planHeight, area.y];

  const draw = (camera: Camera, box: Area, own: TrussView['scale']): void => {
    const drawn = drawTrussView(
      pen,
      { ...box, height: box.height - CAPTION },
      {
        camera,
        scale: own,
        nodes: views.nodes,
        struts: views.struts,
        edge: ROUND,
        marks: own === 'fill' ? 'all' : 'own',
      },
    );
    pen.text(`${camera.name}, ${drawn.scale}`, box.x + box.width / 2, box.y + box.height - 2, {
      size: SIZE.note,
      align: 'centre',
    });
  };
  const right: Area = { x: area.x + left, y: frontY, width: area.width - left, height: frontHeight };
  draw(FRONT, { x: area.x, y: frontY, width: left, height: frontHeight }, scale);
  draw(side, right, scale);
  draw(PLAN, { x: area.x, y: planY, width: left, height: planHeight }, scale);
  draw(ISOMETRIC, { ...right, y: planY, height: planHeight }, 'fill');
}

type Size = readonly [number, number];

function extent(camera: Camera, nodes: ProjectedViews['nodes']): Size {
  const flat = nodes.map((n) => project(camera, n.at));
  return [0, 1].map((axis) => {
    const values = flat.map((p) => p[axis as 0 | 1]);
    return values.length > 0 ? Math.max(...values) - Math.min(...values) : 0;
  }) as unknown as Size;
}
