import { ROUND_OFF } from '../../model/tolerance.js';
import type { Flow } from '../kit/flow.js';
import type { Paper } from '../kit/paper.js';
import type { Units } from '../kit/units.js';
import { ISOMETRIC } from '../kit/view/camera.js';
import { drawForceLegend, FORCE_LEGEND_HEIGHT } from '../kit/view/force-legend.js';
import { strokeOfForce } from '../kit/view/stroke.js';
import { drawTrussView } from '../kit/view/truss-view.js';
import { memberRows } from '../member-rows.js';
import type { PackRecords } from '../records.js';

/** The truss with its forces and the marks of its nodes. */
export function picturesSection(paper: Paper, flow: Flow, records: PackRecords, units: Units): void {
  const { truss, nodeIndex } = records.topology;
  const rows = memberRows(records);
  const largest = rows.reduce((most, r) => Math.max(most, Math.abs(r.force ?? 0)), 0);
  const supported = new Set(truss.supports.map((s) => s.node));
  flow.heading('The truss and its forces', 120);
  flow.picture(Math.max(120, flow.left), (area) => {
    const foot = area.y + area.height - FORCE_LEGEND_HEIGHT;
    drawTrussView(
      paper.pen,
      { ...area, height: area.height - FORCE_LEGEND_HEIGHT - 2 },
      {
        camera: ISOMETRIC,
        scale: 'fill',
        nodes: truss.nodes.map((n) => ({ mark: n.mark, at: n.at, support: supported.has(n.mark) })),
        struts: rows.map(({ member, force }) => ({
          mark: member.mark,
          from: nodeIndex.get(member.ends[0])!,
          to: nodeIndex.get(member.ends[1])!,
          stroke: strokeOfForce(force, largest, ROUND_OFF.forceScale.value * largest),
          label: null,
        })),
      },
    );
    drawForceLegend(paper.pen, area.x, foot, largest, units);
  });
}
