import { offsetRings } from '../../maths/polygon/boolean.js';
import { type Ring, signedArea, toPoints, toRing } from '../../maths/polygon/ring.js';
import { addScaled, dot, Z_AXIS } from '../../maths/vec3.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { PanelEdge, PanelPart, Point2 } from '../../model/parts.js';
import type { Face } from '../../model/truss.js';
import { type PanelChoice, panelChoice } from './choice.js';
import { engrave } from './engraving.js';
import { type FaceLoop, faceLoop } from './face-loop.js';
import { flatFigure, foldedFigure } from './fold.js';
import { panelHold, sayHold, whyNotHeld } from './holding.js';
import { EDGE_OVER_DIAMETER, holesAlong, ON_LINE, spanOnLine } from './holes.js';
import { isOutdoors, movementStrain } from './movement.js';
import { type Patch, patchesOf } from './patches.js';
import type { Seats } from './seats.js';
import type { PanelSetting } from './setting.js';

/** Outlines, holes, marks and edges of every face that is a panel, in the faces' order, with what is wrong with them. */
export function detailPanels(setting: PanelSetting): {
  readonly panels: readonly PanelPart[];
  readonly findings: readonly Finding[];
} {
  const findings: Finding[] = [];
  const report = (found: Finding): void => void findings.push(found);
  const panels = setting.topology.truss.faces.flatMap((face, f) =>
    face.panel ? patchesOf(setting, face, f, report).map((patch) => detailPanel(setting, face, patch, report)) : [],
  );
  return { panels, findings };
}

function detailPanel(setting: PanelSetting, face: Face, patch: Patch, report: (found: Finding) => void): PanelPart {
  const { job, topology } = setting;
  const { form, mark } = patch;
  const choice = panelChoice(job, face);
  if (!choice.material) report(finding('panel-material-unknown', mark, { about: { material: choice.materialName } }));
  const plane = form.normal ? faceLoop(topology, patch.nodes, form.origin, form.normal) : null;
  if (!plane || form.crossesItself || !patch.makeable) return emptyPanel(face, patch, choice, plane);
  const { loop, seats, rings, fold } = patch.halves
    ? foldedFigure(setting, patch.halves, choice)
    : flatFigure(setting, patch, plane, choice);
  if (rings.length === 0) {
    report(finding('panel-vanishes', mark));
    return emptyPanel(face, patch, choice, loop, seats.edges);
  }
  const neck = offsetRings([rings[0]!], -choice.thickness / 2, 'mitre');
  if (rings.length > 1) {
    report(finding('panel-in-pieces', mark, { value: rings.length }));
    return emptyPanel(face, patch, choice, loop, seats.edges);
  }
  if (neck.length === 0) {
    report(finding('panel-vanishes', mark));
    return emptyPanel(face, patch, choice, loop, seats.edges);
  }
  if (neck.length > 1) report(finding('panel-neck', mark, { limit: choice.thickness }));

  const outline = rings[0]!;
  const strain = movementStrain(job, choice.material);
  const reach = Math.max(...loop.corners.map((c) => Math.hypot(c[0], c[1])));
  const oversize = job.panels.holes.oversize_mm ?? (isOutdoors(job) ? 2 * strain * reach : 0);
  const drilled = job.panels.holdBy === 'ties' || job.panels.holdBy === 'stand-offs';
  const row = holesAlong(
    outline,
    loop.corners,
    seats.insets,
    drilled ? job.panels.holes : { ...job.panels.holes, diameter_mm: 0 },
    oversize,
  );
  const leastEdge = EDGE_OVER_DIAMETER * row.diameter;
  if (row.nearest !== null && row.nearest < leastEdge - ON_LINE)
    report(finding('panel-hole-near-edge', mark, { value: row.nearest, limit: leastEdge }));

  const edgeLoss = Math.max(0, ...seats.movements.map((m) => job.panels.gap_mm + 2 * m));
  const clips = seats.edges.reduce(
    (sum, e) => (e.strut === null ? sum : sum + Math.max(1, Math.floor(e.length / job.panels.holes.pitch_mm))),
    0,
  );
  const hold = panelHold(job, job.panels.holdBy === 'clips' ? clips : row.centres.length, edgeLoss);
  const why = whyNotHeld(hold, row.diameter);
  if (why !== null) report(finding('panel-not-held', mark, { about: { why } }));

  const engraved = job.panels.mark
    ? engrave(outline, row.holes.map(toRing), wordsOf(mark, loop, seats), job.panels.markHeight_mm)
    : null;
  if (engraved && engraved.height === 0) report(finding('panel-without-mark', mark, { value: 0 }));
  const area = signedArea(outline) - row.holes.reduce((sum, h) => sum + signedArea(toRing(h)), 0);
  const mass = choice.material ? area * choice.thickness * choice.material.density * KG_PER_MM3 : null;
  if (mass !== null && mass > LIFT_KG) report(finding('panel-heavy', mark, { value: mass, limit: LIFT_KG }));
  for (const hazard of choice.material?.hazards ?? [])
    if (job.cutter.kind === 'laser') report(finding('panel-hazard', mark, { about: { hazard: HAZARDS[hazard] } }));
  if (job.cutter.kind === 'laser' && seats.edges.some((e) => e.bevel !== 0))
    report(finding('panel-bevel-by-hand', mark));
  return {
    ...emptyPanel(face, patch, choice, loop, seats.edges),
    frame: seatFrame(loop, choice, seats),
    edges: withSides(outline, loop, seats),
    outline: toPoints(outline),
    holes: row.holes,
    // The score line is engraved with the marks: it is cut part of the way, never through.
    engraving: [...(fold ? [[fold.from, fold.to]] : []), ...(engraved?.strokes ?? [])],
    area,
    mass,
    holding: sayHold(hold),
    hold,
    makeable: choice.material !== null,
    ...(fold ? { fold } : {}),
    ...(patch.bendStress === null ? {} : { bendStress: patch.bendStress }),
  };
}

const KG_PER_MM3 = 1e-9; // times kg/m³
/** Most that one person lifts on a site: 20 to 25 kg in common guidance; common practice, no source. */
const LIFT_KG = 20;
const HAZARDS: Readonly<Record<string, string>> = {
  'laser-chlorine': 'its material gives off chlorine under a laser: never cut it on one',
  'laser-fire': 'its material burns and soots under a laser: do not cut it on one',
};

/** The frame of the outline: in the plane of the axes, or in the plane where the panel rests on the struts. */
function seatFrame(loop: FaceLoop, choice: PanelChoice, seats: Seats): PanelPart['frame'] {
  const height = choice.seating === 'between' ? 0 : choice.seating === 'over' ? seats.low : seats.high;
  return { ...loop.frame, origin: addScaled(loop.frame.origin, loop.frame.z, height) };
}

/** The edges with the part of the outline that runs along each. */
function withSides(outline: Ring, loop: FaceLoop, seats: Seats): readonly PanelEdge[] {
  return seats.edges.map((edge, i) => {
    const [a, b] = [loop.corners[i]!, loop.corners[(i + 1) % loop.corners.length]!];
    const l = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1;
    const u: Point2 = [(b[0] - a[0]) / l, (b[1] - a[1]) / l];
    const d = seats.insets[i]!;
    const span = spanOnLine(outline, a, u, d);
    if (!span) return edge;
    const at = (s: number): Point2 => [a[0] + u[0] * s - u[1] * d, a[1] + u[1] * s + u[0] * d];
    return { ...edge, side: [at(span[0]), at(span[1])] };
  });
}

function wordsOf(mark: string, loop: FaceLoop, seats: Seats): Parameters<typeof engrave>[2] {
  const { x, y } = loop.frame;
  const up: Point2 = [dot(x, Z_AXIS), dot(y, Z_AXIS)];
  const rise = Math.hypot(up[0], up[1]);
  const longest = seats.edges.reduce(
    (best, e, i) => (e.strut && (best < 0 || e.length > seats.edges[best]!.length) ? i : best),
    -1,
  );
  return {
    mark,
    up: rise > LEVEL ? [up[0] / rise, up[1] / rise] : null,
    strut:
      longest < 0
        ? null
        : {
            mark: seats.edges[longest]!.strut!,
            from: loop.corners[longest]!,
            to: loop.corners[(longest + 1) % loop.corners.length]!,
            inset: seats.insets[longest]!,
          },
  };
}

/** Sine of the slope under which a panel lies level and no way up can be told. */
const LEVEL = 0.02;

function emptyPanel(
  face: Face,
  patch: Patch,
  choice: PanelChoice,
  loop: FaceLoop | null,
  edges: readonly PanelEdge[] = [],
): PanelPart {
  return {
    mark: patch.mark,
    face: face.mark,
    group: face.group,
    material: choice.material,
    thickness: choice.thickness,
    seating: choice.seating,
    flatness: patch.form.flatness,
    frame: loop?.frame ?? { origin: patch.form.origin, x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] },
    outline: [],
    holes: [],
    edges,
    engraving: [],
    area: 0,
    mass: null,
    holding: 'nothing',
    makeable: false,
  };
}
