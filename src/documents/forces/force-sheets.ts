import { ROUND_OFF } from '../../model/tolerance.js';
import { GIVEN_CASE } from '../../model/truss.js';
import { CAUTION } from '../cautions.js';
import { issueOf } from '../issue.js';
import { writeFitted } from '../kit/fit-text.js';
import type { Fonts } from '../kit/fonts.js';
import { SIZE } from '../kit/ink.js';
import { Paper, type Written } from '../kit/paper.js';
import { type Column, drawTable } from '../kit/table.js';
import { fixed, type Units, unitsOf } from '../kit/units.js';
import { type Camera, FRONT, ISOMETRIC, LEFT, PLAN, project, RIGHT } from '../kit/view/camera.js';
import { drawForceLegend, FORCE_LEGEND_HEIGHT } from '../kit/view/force-legend.js';
import type { ViewArrow } from '../kit/view/marks/arrow.js';
import { drawProjectedViews } from '../kit/view/projected-views.js';
import { strokeOfForce } from '../kit/view/stroke.js';
import { drawTrussView, fillFactor, type ViewNode, type ViewStrut } from '../kit/view/truss-view.js';
import { largestForce, type MemberRow, memberRows } from '../member-rows.js';
import type { PackRecords } from '../records.js';

/** Struts whose numbers one picture carries: more cannot be told apart on A4. */
const LABELLED = 52;
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
  table(paper, records, rows, units);
  return paper.finish();
}

interface Scene {
  readonly nodes: readonly ViewNode[];
  readonly ends: readonly (readonly [number, number])[];
  readonly arrows: readonly ViewArrow[];
  readonly strut: (row: MemberRow, i: number) => ViewStrut;
}

function sceneOf(records: PackRecords, rows: readonly MemberRow[], largest: number, units: Units): Scene {
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
            .map(({ newton, ...arrow }) => ({
              ...arrow,
              label: `${units.force(newton).replace('+', '')} ${units.forceUnit}`,
            })),
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
  const parts = partsOf(camera, scene, rows);
  const orientation = paper.orientationFor((room) => fillFactor(scene.nodes, camera, room));
  for (const part of parts) {
    const area = paper.addSheet({
      title: part.name === '' ? camera.name : `${camera.name}: ${part.name}`,
      instruction: `Force in ${units.forceUnit} beside each strut: T pulls, C pushes. ${
        parts.length > 1 ? 'Thin lines: see the other sheets of this view. ' : ''
      }Not to scale.`,
      orientation,
    });
    const shown = new Set(part.members);
    const touched = new Set(part.members.flatMap((i) => scene.ends[i]!));
    const drawn = drawTrussView(
      paper.pen,
      { ...area, height: area.height - FORCE_LEGEND_HEIGHT - 6 },
      {
        camera,
        scale: 'fill',
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
    const foot = area.y + area.height - FORCE_LEGEND_HEIGHT;
    if (drawn.unplaced.length > 0)
      writeFitted(
        paper.pen,
        `No room here, see the table: ${drawn.unplaced.join(', ')}`,
        area.x,
        foot - 1.5,
        area.width,
        { size: SIZE.note },
      );
    drawForceLegend(paper.pen, area.x, foot, largest, units);
  }
}

/** What one sheet of a view shows in full. */
interface Part {
  readonly name: string;
  readonly members: readonly number[];
}

/**
 * The struts of a view in parts whose labels stay legible: all in one where they can be, else by the truss's own groups
 * where each is small enough, else by depth, nearest first.
 */
function partsOf(camera: Camera, scene: Scene, rows: readonly MemberRow[]): Part[] {
  const all = rows.map((_, i) => i);
  if (rows.length <= LABELLED) return [{ name: '', members: all }];
  const groups = new Map<string, number[]>();
  rows.forEach((row, i) => {
    const key = row.member.group ?? 'other struts';
    groups.set(key, [...(groups.get(key) ?? []), i]);
  });
  const sheets = Math.ceil(rows.length / LABELLED);
  if (groups.size > 1 && groups.size <= 2 * sheets && [...groups.values()].every((g) => g.length <= LABELLED))
    return [...groups].map(([name, members]) => ({ name, members }));
  const depth = scene.ends.map(
    ([a, b]) => project(camera, scene.nodes[a]!.at)[2] + project(camera, scene.nodes[b]!.at)[2],
  );
  const order = all.sort((a, b) => depth[b]! - depth[a]! || a - b);
  return Array.from({ length: sheets }, (_, k) => ({
    name: `layer ${k + 1} of ${sheets}${k === 0 ? ', nearest' : k === sheets - 1 ? ', farthest' : ''}`,
    members: order.slice(Math.round((k * rows.length) / sheets), Math.round(((k + 1) * rows.length) / sheets)),
  }));
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
