import { ROUND_OFF } from '../../model/tolerance.js';
import { GIVEN_CASE } from '../../model/truss.js';
import { CAUTION } from '../cautions.js';
import { issueOf } from '../issue.js';
import type { Fonts } from '../kit/fonts.js';
import { SIZE } from '../kit/ink.js';
import { Paper, type Written } from '../kit/paper.js';
import { type Column, drawTable } from '../kit/table.js';
import { fixed, type Units, unitsOf } from '../kit/units.js';
import { type Camera, FRONT, ISOMETRIC, LEFT, PLAN, project, RIGHT } from '../kit/view/camera.js';
import { drawForceLegend, FORCE_LEGEND_HEIGHT } from '../kit/view/force-legend.js';
import { drawProjectedViews } from '../kit/view/projected-views.js';
import { strokeOfForce } from '../kit/view/stroke.js';
import { drawTrussView, type ViewArrow, type ViewNode, type ViewStrut } from '../kit/view/truss-view.js';
import { largestForce, type MemberRow, memberRows } from '../member-rows.js';
import type { PackRecords } from '../records.js';

/** Struts whose numbers one picture carries: more cannot be told apart on A4. */
const LABELLED = 44;
/** In a truss of more struts only the isometric view is split until every strut has its number beside it. */
const ALL_VIEWS_UP_TO = 600;

/** force-sheets.pdf: the views by projection, each view large with the force beside each strut, and a table by member. */
export async function forceSheets(records: PackRecords, fonts: Fonts): Promise<Written> {
  const units = unitsOf(records.job, largestForce(records));
  const paper = new Paper(issueOf(records, fonts), 'Force sheets', CAUTION, units.words);
  const rows = memberRows(records);
  const largest = rows.reduce((most, r) => Math.max(most, Math.abs(r.force ?? 0)), 0);
  const scene = sceneOf(records, rows, largest);

  overview(paper, records, scene, largest, units);
  const side = records.job.output.projection === 'first-angle' ? LEFT : RIGHT;
  for (const camera of [ISOMETRIC, PLAN, FRONT, side]) {
    if (camera !== ISOMETRIC && rows.length > ALL_VIEWS_UP_TO) continue;
    pictures(paper, camera, rows, scene, largest, units);
  }
  table(paper, records, rows, units);
  return paper.finish();
}

interface Scene {
  readonly nodes: readonly ViewNode[];
  readonly ends: readonly (readonly [number, number])[];
  readonly arrows: readonly ViewArrow[];
  readonly strut: (row: MemberRow, i: number) => ViewStrut;
}

function sceneOf(records: PackRecords, rows: readonly MemberRow[], largest: number): Scene {
  const { truss, nodeIndex } = records.topology;
  const supported = new Set(truss.supports.map((s) => s.node));
  const ends = rows.map(({ member }) => [nodeIndex.get(member.ends[0])!, nodeIndex.get(member.ends[1])!] as const);
  return {
    nodes: truss.nodes.map((n) => ({ mark: n.mark, at: n.at, support: supported.has(n.mark) })),
    ends,
    arrows:
      records.forces?.source === 'analysis'
        ? []
        : truss.loads
            .filter((load) => load.case === GIVEN_CASE)
            .map((load) => ({
              node: nodeIndex.get(load.node)!,
              direction: load.force,
              length: 11,
              newton: Math.hypot(...load.force),
            }))
            .map(({ newton, ...arrow }) => ({ ...arrow, label: fixed(newton, newton >= 100 ? 0 : 1) })),
    strut: (row, i) => ({
      mark: row.member.mark,
      from: ends[i]![0],
      to: ends[i]![1],
      stroke: strokeOfForce(row.force, largest, ROUND_OFF.forceScale.value * largest),
      label: null,
    }),
  };
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
  const layers = layersOf(camera, scene, rows.length);
  layers.forEach((layer, k) => {
    const part = layers.length === 1 ? '' : `, part ${k + 1} of ${layers.length}`;
    const area = paper.addSheet({
      title: `${camera.name}${part}`,
      instruction:
        layers.length === 1
          ? `Force in ${units.forceUnit} beside each strut: T pulls, C pushes. Not to scale: take no length from this sheet.`
          : `Force in ${units.forceUnit} beside each strut that is drawn full, from ${k === 0 ? 'the nearest on' : k === layers.length - 1 ? 'the farthest' : 'the middle'}; thin lines are on the other parts. T pulls, C pushes. Not to scale.`,
    });
    const shown = new Set(layer);
    const touched = new Set(layer.flatMap((i) => scene.ends[i]!));
    const drawn = drawTrussView(
      paper.pen,
      { ...area, height: area.height - FORCE_LEGEND_HEIGHT - 6 },
      {
        camera,
        scale: 'fill',
        nodes: scene.nodes.map((n, i) => ({ ...n, labelled: touched.has(i) })),
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
    const foot = area.y + area.height - FORCE_LEGEND_HEIGHT;
    if (drawn.unplaced.length > 0)
      paper.pen.text(`No room here, see the table: ${drawn.unplaced.join(', ')}`, area.x, foot - 1.5, {
        size: SIZE.note,
      });
    drawForceLegend(paper.pen, area.x, foot, largest, units);
  });
}

/** Struts by depth, nearest first, in as many even parts as keep every part's labels legible. Indices of members. */
function layersOf(camera: Camera, scene: Scene, count: number): number[][] {
  const depth = scene.ends.map(
    ([a, b]) => project(camera, scene.nodes[a]!.at)[2] + project(camera, scene.nodes[b]!.at)[2],
  );
  const order = Array.from({ length: count }, (_, i) => i).sort((a, b) => depth[b]! - depth[a]! || a - b);
  const parts = Math.max(1, Math.ceil(count / LABELLED));
  return Array.from({ length: parts }, (_, k) =>
    order.slice(Math.round((k * count) / parts), Math.round(((k + 1) * count) / parts)),
  );
}

function table(paper: Paper, records: PackRecords, rows: readonly MemberRow[], units: Units): void {
  const area = paper.addSheet({
    title: 'Forces by member',
    instruction: `Forces ${SOURCE_WORDS[records.forces?.source ?? 'none']}, in ${units.forceUnit}; tension is positive.`,
  });
  const analysed = rows.some((r) => r.envelope);
  const judged = rows.some((r) => r.worst);
  const columns: Column<MemberRow>[] = [
    { head: 'Strut', bold: true, value: (r) => r.member.mark },
    { head: 'From', value: (r) => r.member.ends[0] },
    { head: 'To', value: (r) => r.member.ends[1] },
    { head: 'Section', value: (r) => r.part.section?.name ?? r.member.section ?? '' },
    { head: `Force\n${units.forceUnit}`, align: 'right', bold: true, value: (r) => units.force(r.force) },
    { head: '', value: (r) => units.sense(r.force) },
  ];
  if (analysed)
    columns.push(
      { head: `Least\n${units.forceUnit}`, align: 'right', value: (r) => units.force(r.envelope?.least ?? null) },
      { head: `Most\n${units.forceUnit}`, align: 'right', value: (r) => units.force(r.envelope?.most ?? null) },
    );
  if (judged)
    columns.push(
      { head: 'Utilisation', align: 'right', bold: true, value: (r) => fixed(r.worst?.utilisation, 2) },
      { head: 'Governing', wraps: true, value: (r) => r.worst?.combination ?? '' },
    );
  if (!judged)
    columns.push({
      head: `Axis length\n${units.lengthUnit}`,
      align: 'right',
      grey: true,
      value: (r) => units.length(r.part.axisLength),
    });
  const grouped = rows.some((r) => r.member.group);
  drawTable(
    paper,
    area.y,
    columns,
    grouped ? groupRuns(rows) : rows,
    grouped ? { group: (r) => (r.member.group ? `Group ${r.member.group}` : 'No group') } : {},
  );
}

/** Rows of one group together, groups in the order in which they first come. */
function groupRuns(rows: readonly MemberRow[]): MemberRow[] {
  const runs = new Map<string, MemberRow[]>();
  for (const row of rows) {
    const key = row.member.group ?? '';
    runs.set(key, [...(runs.get(key) ?? []), row]);
  }
  return [...runs.values()].flat();
}

const SOURCE_WORDS = {
  given: 'as given in the truss file',
  reciprocal: 'from the areas of the reciprocal figure',
  analysis: 'from the analysis',
  none: 'not known',
} as const;
