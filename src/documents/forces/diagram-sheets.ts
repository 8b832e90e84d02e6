import { mean, type Vec3 } from '../../maths/vec3.js';
import type { ForceDiagram } from '../../model/force-diagram.js';
import type { Area } from '../kit/geometry2.js';
import { INK, SIZE } from '../kit/ink.js';
import type { Paper } from '../kit/paper.js';
import { sayInUnits } from '../kit/say-in-units.js';
import { fixed, type Units } from '../kit/units.js';
import { type Camera, ISOMETRIC } from '../kit/view/camera.js';
import { planeCamera } from '../kit/view/plane-camera.js';
import { drawTrussView, type ViewStrut } from '../kit/view/truss-view.js';
import type { MemberRow } from '../member-rows.js';
import type { PackRecords } from '../records.js';
import { type Part, partsOf, type Scene } from './scene.js';

/** Height of a picture's caption, mm. */
const CAPTION = 7;

/**
 * The truss and its force diagram on one sheet, their marks the same: in space a strut's force is the area of the polygon
 * that carries its mark, in the plane the length of the line.
 */
export function diagramSheets(
  paper: Paper,
  records: PackRecords,
  diagram: ForceDiagram,
  scene: Scene,
  rows: readonly MemberRow[],
  units: Units,
): void {
  const plane = diagram.kind === 'plane';
  const camera = plane ? planeCamera(records.topology.truss.nodes.map((n) => n.at)) : ISOMETRIC;
  const parts = partsOf(camera, scene, rows);
  for (const part of parts) {
    const area = paper.addSheet({
      title: part.name === '' ? 'Form and forces' : `Form and forces: ${part.name}`,
      instruction: plane
        ? 'The truss and its force diagram. The line with a strut’s mark stands square to that strut; its length is the force.'
        : 'The truss and its force diagram. The polygon with a strut’s mark stands square to that strut; its area is the force. Round marks of the diagram are cells of the truss.',
    });
    const [first, second] = halves(area);
    drawForm(paper, first, camera, scene, rows, part);
    drawDiagram(paper, second, camera, diagram, scene, rows, part);
    caption(paper, first, 'Truss');
    const unit = plane ? 'unit of length' : 'squared unit';
    const scale = `${fixed(diagram.newtonPerUnit, diagram.newtonPerUnit < 10 ? 3 : 1)} N for one ${unit} of the diagram`;
    const largest = rows.reduce((most, r) => Math.max(most, Math.abs(r.force ?? 0)), 0);
    caption(
      paper,
      second,
      `Force diagram: ${sayInUnits(scale, records.job.output)}; the largest force is ${units.force(largest).replace('+', '')} ${units.forceUnit}`,
    );
  }
}

/** Side by side on a wide sheet, else one above the other. */
function halves(area: Area): readonly [Area, Area] {
  if (area.width > area.height) {
    const width = (area.width - 8) / 2;
    return [
      { ...area, width },
      { ...area, x: area.x + width + 8, width },
    ];
  }
  const height = (area.height - 4) / 2;
  return [
    { ...area, height },
    { ...area, y: area.y + height + 4, height },
  ];
}

function caption(paper: Paper, area: Area, text: string): void {
  paper.pen.text(text, area.x + area.width / 2, area.y + area.height - 2, {
    size: SIZE.note,
    align: 'centre',
    colour: INK.black,
  });
}

const pictureOf = (area: Area): Area => ({ ...area, height: area.height - CAPTION });

function drawForm(
  paper: Paper,
  area: Area,
  camera: Camera,
  scene: Scene,
  rows: readonly MemberRow[],
  part: Part,
): void {
  const shown = new Set(part.members);
  drawTrussView(paper.pen, pictureOf(area), {
    camera,
    scale: 'fill',
    marks: 'own',
    nodes: scene.nodes,
    struts: rows.map((row, i) => {
      const strut = scene.strut(row, i);
      return shown.has(i)
        ? { ...strut, label: { bold: row.member.mark, plain: '' } }
        : { ...strut, stroke: { kind: 'faint' } };
    }),
  });
}

function drawDiagram(
  paper: Paper,
  area: Area,
  camera: Camera,
  diagram: ForceDiagram,
  scene: Scene,
  rows: readonly MemberRow[],
  part: Part,
): void {
  const nodes = diagram.vertices.map((v) => ({ mark: v.cell, at: v.at }));
  const plane = diagram.kind === 'plane';
  const index = new Map(rows.map((row, i) => [row.member.mark, i]));
  const shown = new Set(part.members);
  const struts: ViewStrut[] = [];
  const spots: { mark: { bold: string; plain: string }; at: Vec3 }[] = [];
  const drawn = new Set<string>();
  for (const polygon of diagram.struts) {
    const i = index.get(polygon.mark)!;
    const own = shown.has(i);
    const { stroke } = scene.strut(rows[i]!, i);
    if (plane && polygon.loop.length === 2) {
      const [from, to] = polygon.loop as [number, number];
      const label = own ? { bold: polygon.mark, plain: '' } : null;
      struts.push({ mark: polygon.mark, from, to, stroke: own ? stroke : { kind: 'faint' }, label });
      continue;
    }
    polygon.loop.forEach((from, k) => {
      const to = polygon.loop[(k + 1) % polygon.loop.length]!;
      const key = `${Math.min(from, to)} ${Math.max(from, to)} ${own}`;
      if (from === to || drawn.has(key)) return;
      drawn.add(key);
      const mark = `line ${struts.length}`;
      struts.push({ mark, from, to, stroke: own ? { kind: 'plain', width: 0.3 } : { kind: 'faint' }, label: null });
    });
    if (own)
      spots.push({
        mark: { bold: polygon.mark, plain: '' },
        at: mean(polygon.loop.map((v) => diagram.vertices[v]!.at)),
      });
  }
  drawTrussView(paper.pen, pictureOf(area), { camera, scale: 'fill', nodes, struts, spots });
}
