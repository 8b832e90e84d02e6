import { CAUTION } from '../cautions.js';
import { issueOf } from '../issue.js';
import { writeFitted } from '../kit/fit-text.js';
import type { Fonts } from '../kit/fonts.js';
import type { Area } from '../kit/geometry2.js';
import { SIZE } from '../kit/ink.js';
import { Paper, type Written } from '../kit/paper.js';
import { type Units, unitsOf } from '../kit/units.js';
import { type Camera, FRONT, ISOMETRIC, LEFT, PLAN, RIGHT } from '../kit/view/camera.js';
import { drawForceLegend, FORCE_LEGEND_HEIGHT } from '../kit/view/force-legend.js';
import { drawProjectedViews } from '../kit/view/projected-views.js';
import { drawTrussView, fillFactor } from '../kit/view/truss-view.js';
import { largestForce, type MemberRow, memberRows } from '../member-rows.js';
import type { PackRecords } from '../records.js';
import { diagramSheets } from './diagram-sheets.js';
import { forceTable } from './force-table.js';
import { partsOf, type Scene, sceneOf } from './scene.js';

/** In a truss of more struts only the isometric view is split until every strut has its number beside it. */
const ALL_VIEWS_UP_TO = 600;

/** force-sheets.pdf: the views by projection, each view large with the force beside each strut, and a table by member. */
export async function forceSheets(records: PackRecords, fonts: Fonts): Promise<Written> {
  const units = unitsOf(records.job, largestForce(records));
  const paper = new Paper(issueOf(records, fonts), 'Force sheets', CAUTION, units.words);
  const rows = memberRows(records);
  const largest = rows.reduce((most, r) => Math.max(most, Math.abs(r.force ?? 0)), 0);
  const scene = sceneOf(records, rows, largest, units);

  overview(paper, records, scene, largest, units);
  const side = records.job.output.projection === 'first-angle' ? LEFT : RIGHT;
  for (const camera of [ISOMETRIC, PLAN, FRONT, side]) {
    if (camera !== ISOMETRIC && rows.length > ALL_VIEWS_UP_TO) continue;
    pictures(paper, camera, rows, scene, largest, units);
  }
  if (records.reciprocal?.diagram) diagramSheets(paper, records, records.reciprocal.diagram, scene, rows, units);
  forceTable(paper, records, rows, units);
  return paper.finish();
}

function overview(paper: Paper, records: PackRecords, scene: Scene, largest: number, units: Units): void {
  const area = paper.addSheet({
    title: 'Forces: the whole',
    instruction:
      'Find a node here, then its struts on the sheets that follow. Double orange lines pull (T), solid purple lines push (C); the wider, the more.',
    projection: true,
  });
  const views = { ...area, height: area.height - FORCE_LEGEND_HEIGHT - 2 };
  drawProjectedViews(paper.pen, views, {
    nodes: scene.nodes,
    struts: memberRows(records).map(scene.strut),
    method: records.job.output.projection,
  });
  drawForceLegend(paper.pen, area.x, area.y + area.height - FORCE_LEGEND_HEIGHT, largest, units);
}

function pictures(
  paper: Paper,
  camera: Camera,
  rows: readonly MemberRow[],
  scene: Scene,
  largest: number,
  units: Units,
): void {
  const parts = partsOf(camera, scene, rows);
  for (const part of parts) {
    const touched = new Set(part.members.flatMap((i) => scene.ends[i]!));
    const framed = part.enlarged ? scene.nodes.filter((_, i) => touched.has(i)) : scene.nodes;
    const area = paper.addSheet({
      title: part.name === '' ? camera.name : `${camera.name}: ${part.name}`,
      instruction: `Force in ${units.forceUnit} beside each strut: T pulls, C pushes. ${
        parts.length > 1 ? 'Thin lines: see the other sheets of this view. ' : ''
      }Not to scale.`,
      orientation: paper.orientationFor((room) => fillFactor(framed, camera, room)),
    });
    const shown = new Set(part.members);
    const footHeight = part.enlarged ? KEY.height : FORCE_LEGEND_HEIGHT;
    const foot = area.y + area.height - footHeight;
    const drawn = drawTrussView(
      paper.pen,
      { ...area, height: area.height - footHeight - 6 },
      {
        camera,
        scale: 'fill',
        ...(part.enlarged ? { frame: touched } : {}),
        nodes: scene.nodes.map((n, i) => ({ ...n, show: touched.has(i) ? 'mark' : 'dot' })),
        arrows: scene.arrows.filter((a) => touched.has(a.node)),
        struts: rows.map((row, i) => {
          const strut = scene.strut(row, i);
          if (!shown.has(i)) return { ...strut, stroke: { kind: 'faint' } };
          const sense = units.sense(row.force);
          return {
            ...strut,
            label: { bold: row.member.mark, plain: `${units.force(row.force)}${sense === '' ? '' : ` ${sense}`}` },
          };
        }),
      },
    );
    if (drawn.unplaced.length > 0)
      writeFitted(
        paper.pen,
        `No room here, see the table: ${drawn.unplaced.join(', ')}`,
        area.x,
        foot - 1.5,
        area.width,
        { size: SIZE.note },
      );
    drawForceLegend(paper.pen, area.x, area.y + area.height - FORCE_LEGEND_HEIGHT, largest, units);
    if (part.enlarged) drawKey(paper, camera, scene, rows, shown, area);
  }
}

/** Where an enlarged part lies in the whole: a small picture at the foot. */
const KEY = { width: 46, height: 26 } as const;

function drawKey(
  paper: Paper,
  camera: Camera,
  scene: Scene,
  rows: readonly MemberRow[],
  shown: ReadonlySet<number>,
  area: Area,
): void {
  const box = { x: area.x + area.width - KEY.width, y: area.y + area.height - KEY.height, ...KEY };
  drawTrussView(paper.pen, box, {
    camera,
    scale: 'fill',
    edge: 1,
    nodes: scene.nodes.map((n) => ({ mark: n.mark, at: n.at, show: 'none' })),
    struts: rows.map((row, i) => ({
      ...scene.strut(row, i),
      stroke: shown.has(i) ? { kind: 'plain', width: 0.3 } : { kind: 'faint' },
    })),
  });
}
