import type { Flow } from '../../kit/flow.js';
import { INK, LINE, SIZE } from '../../kit/ink.js';
import type { Paper } from '../../kit/paper.js';
import type { Pen } from '../../kit/pen.js';
import { fixed } from '../../kit/units.js';
import { ISOMETRIC } from '../../kit/view/camera.js';
import { grey } from '../../kit/view/stroke.js';
import { drawTrussView } from '../../kit/view/truss-view.js';
import { memberRows } from '../../member-rows.js';
import type { PackRecords } from '../../records.js';
import { sceneOf } from './scene.js';

const LEGEND = 9;
/** Struts below 1 that are named all the same: the most used ones. */
const NAMED = 12;
/** Over-stressed struts that one picture names; the table has all. */
const PENNANTS = 40;

/** The truss with every strut as grey as it is used, and a black pennant on each that is over-stressed. */
export function utilisationPicture(paper: Paper, flow: Flow, records: PackRecords): void {
  const rows = memberRows(records);
  if (!rows.some((r) => r.worst)) return;
  const { nodes, struts } = sceneOf(records);
  const used = rows.map((r) => r.worst?.utilisation ?? null);
  const order = [...used.keys()].sort((a, b) => (used[b] ?? -1) - (used[a] ?? -1) || a - b);
  const named = new Set(order.filter((i, rank) => used[i] !== null && rank < ((used[i] ?? 0) > 1 ? PENNANTS : NAMED)));
  flow.heading('Utilisation of the struts', 150);
  const over = used.filter((u) => (u ?? 0) > 1).length;
  if (over > PENNANTS)
    flow.paragraph(`${over} struts are over-stressed; the ${PENNANTS} worst are named here, all in the table below.`);
  flow.picture(flow.left, (area) => {
    drawTrussView(
      paper.pen,
      { ...area, height: area.height - LEGEND - 2 },
      {
        camera: ISOMETRIC,
        scale: 'fill',
        nodes,
        struts: struts.map((strut, i) => {
          const u = used[i] ?? null;
          return {
            ...strut,
            stroke: u === null ? { kind: 'none' } : { kind: 'ramp', width: u > 1 ? 1.9 : 1.4, share: u },
            label: named.has(i) ? { bold: strut.mark, plain: fixed(u, 2), pennant: u !== null && u > 1 } : null,
          };
        }),
      },
    );
    drawLegend(paper.pen, area.x, area.y + area.height - LEGEND);
  });
}

function drawLegend(pen: Pen, x: number, y: number): void {
  const style = { size: SIZE.note };
  pen.text('Utilisation', x, y + 4, { ...style, bold: true });
  let at = x + 18;
  for (const share of [0, 0.25, 0.5, 0.75, 1]) {
    pen.rectangle(at, y + 1.4, 9, 3, { fill: grey(share), width: LINE.hair });
    pen.text(fixed(share, 2), at + 4.5, y + 7.6, { ...style, align: 'centre' });
    at += 11;
  }
  pen.rectangle(at + 4, y + 1.1, 22, 3.6, { fill: INK.black });
  pen.text('S1 1.20', at + 15, y + 3.8, { ...style, bold: true, colour: INK.white, align: 'centre' });
  pen.text('above 1: over-stressed', at + 28, y + 3.8, style);
}
