import { ROUND_OFF } from '../../../model/tolerance.js';
import type { Flow } from '../../kit/flow.js';
import type { Paper } from '../../kit/paper.js';
import type { Units } from '../../kit/units.js';
import { ISOMETRIC } from '../../kit/view/camera.js';
import { drawForceLegend, FORCE_LEGEND_HEIGHT } from '../../kit/view/force-legend.js';
import { strokeOfForce } from '../../kit/view/stroke.js';
import { drawTrussView } from '../../kit/view/truss-view.js';
import type { PackRecords } from '../../records.js';
import { sceneOf } from './scene.js';

/** The truss with its forces and the marks of its nodes. */
export function forcesPicture(paper: Paper, flow: Flow, records: PackRecords, units: Units): void {
  const values = records.forces?.values ?? null;
  const largest = values?.reduce((most, f) => Math.max(most, Math.abs(f)), 0) ?? 0;
  const { nodes, struts } = sceneOf(records);
  flow.heading(values ? 'The truss and its forces' : 'The truss', 150);
  flow.picture(flow.left, (area) => {
    drawTrussView(
      paper.pen,
      { ...area, height: area.height - FORCE_LEGEND_HEIGHT - 2 },
      {
        camera: ISOMETRIC,
        scale: 'fill',
        nodes,
        struts: struts.map((strut, i) => ({
          ...strut,
          stroke: strokeOfForce(values?.[i] ?? null, largest, ROUND_OFF.forceScale.value * largest),
        })),
      },
    );
    if (values) drawForceLegend(paper.pen, area.x, area.y + area.height - FORCE_LEGEND_HEIGHT, largest, units);
  });
}
