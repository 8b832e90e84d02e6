import { areaOf, offsetRings } from '../../maths/polygon/boolean.js';
import { type Ring, signedArea, toPoints, toRing } from '../../maths/polygon/ring.js';
import { tidyRing } from '../../maths/polygon/tidy.js';
import { addScaled, dot, Z_AXIS } from '../../maths/vec3.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { Job } from '../../model/job/index.js';
import type { HubPart, PanelEdge, PanelPart, Point2, StrutPart } from '../../model/parts.js';
import type { Section } from '../../model/section.js';
import type { Topology } from '../../model/topology.js';
import type { Face } from '../../model/truss.js';
import type { FaceForm } from '../faces.js';
import { movedEdges } from './base-outline.js';
import { type PanelChoice, panelChoice } from './choice.js';
import { cutCorner } from './corner-cut.js';
import { engrave } from './engraving.js';
import { type FaceLoop, faceLoop, inward } from './face-loop.js';
import { panelHold, sayHold } from './holding.js';
import { holesAlong } from './holes.js';
import { edgeInset } from './inset.js';
import { isOutdoors, movementStrain } from './movement.js';
import { dihedralAngle, openingAngle } from './neighbours.js';
import { reachAlong, reachInSlab } from './strut-reach.js';

/** A hub's outline between two heights over a panel's plane, as polygons in the panel's frame, mm; they may overlap. */
export type HubOutline = (
  hub: HubPart,
  slab: {
    readonly origin: PanelPart['frame']['origin'];
    readonly x: PanelPart['frame']['x'];
    readonly y: PanelPart['frame']['y'];
    readonly from: number;
    readonly to: number;
  },
) => readonly (readonly Point2[])[];

/** What every panel of a truss is made from. */
export interface PanelSetting {
  readonly topology: Topology;
  readonly job: Job;
  /** By the face's index. */
  readonly forms: readonly FaceForm[];
  /** By the member's index. */
  readonly sections: readonly (Section | null)[];
  readonly axes: readonly StrutPart['axes'][];
  readonly hubs: readonly HubPart[];
  readonly hubOutline: HubOutline;
}

/** Outlines, holes, marks and edges of every face that is a panel, in the faces' order, with what is wrong with them. */
export function detailPanels(setting: PanelSetting): {
  readonly panels: readonly PanelPart[];
  readonly findings: readonly Finding[];
} {
  const findings: Finding[] = [];
  const hubAt = new Map(setting.hubs.map((h) => [h.mark, h]));
  const panels = setting.topology.truss.faces.flatMap((face, f) =>
    face.panel ? [detailPanel(setting, hubAt, face, f, (found) => findings.push(found))] : [],
  );
  return { panels, findings };
}

/** Largest flatness a seat takes where the job says nothing: half the gap, at least what is warned of. mm */
export const flatnessStop = (job: Job): number =>
  job.fit.flatnessStop_mm ?? Math.max(job.fit.flatnessWarn_mm, job.panels.gap_mm / 2);

function detailPanel(
  setting: PanelSetting,
  hubAt: ReadonlyMap<string, HubPart>,
  face: Face,
  f: number,
  report: (found: Finding) => void,
): PanelPart {
  const { job, topology } = setting;
  const form = setting.forms[f]!;
  const choice = panelChoice(job, face);
  if (!choice.material)
    report(finding('panel-material-unknown', face.mark, { about: { material: choice.materialName } }));
  const loop = form.normal ? faceLoop(topology, face.nodes, form.origin, form.normal) : null;
  if (!loop || form.crossesItself) return emptyPanel(face, form, choice, loop);
  const stop = flatnessStop(job);
  if (form.flatness > stop) {
    report(finding('panel-not-flat', face.mark, { value: form.flatness, limit: stop }));
    return emptyPanel(face, form, choice, loop);
  }
  const seats = edgesOf(setting, f, loop, choice);
  const rings = outlineOf(setting, hubAt, loop, choice, seats);
  if (rings.length === 0) {
    report(finding('panel-vanishes', face.mark));
    return emptyPanel(face, form, choice, loop, seats.edges);
  }
  const neck = offsetRings([rings[0]!], -choice.thickness / 2, 'mitre');
  if (rings.length > 1) {
    report(finding('panel-in-pieces', face.mark, { value: rings.length }));
    return emptyPanel(face, form, choice, loop, seats.edges);
  }
  if (neck.length === 0) {
    report(finding('panel-vanishes', face.mark));
    return emptyPanel(face, form, choice, loop, seats.edges);
  }
  if (neck.length > 1) report(finding('panel-neck', face.mark, { limit: choice.thickness }));

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
  if (row.nearest !== null && row.nearest < leastEdge - 1e-9)
    report(finding('panel-hole-near-edge', face.mark, { value: row.nearest, limit: leastEdge }));

  const edgeLoss = Math.max(0, ...seats.movements.map((m) => job.panels.gap_mm + 2 * m));
  const clips = seats.edges.reduce((sum, e) => sum + Math.max(1, Math.floor(e.length / job.panels.holes.pitch_mm)), 0);
  const hold = panelHold(job, choice.seating, job.panels.holdBy === 'clips' ? clips : row.centres.length, edgeLoss);
  if (
    hold.by === 'none' ||
    (hold.by === 'channel' && hold.bite! <= 0) ||
    (hold.by !== 'channel' && hold.fixings === 0)
  ) {
    const why =
      hold.by === 'none'
        ? ''
        : hold.by === 'channel'
          ? 'the channel does not reach over it once it has moved'
          : 'there is no room for a fixing';
    report(finding('panel-not-held', face.mark, { about: { why } }));
  }

  const engraved = job.panels.mark
    ? engrave(outline, row.holes.map(toRing), wordsOf(face.mark, loop, seats), job.panels.markHeight_mm)
    : null;
  if (engraved && engraved.height === 0) report(finding('panel-without-mark', face.mark, { value: 0 }));
  const area = signedArea(outline) - row.holes.reduce((sum, h) => sum + signedArea(toRing(h)), 0);
  const mass = choice.material ? area * choice.thickness * choice.material.density * KG_PER_MM3 : null;
  if (mass !== null && mass > LIFT_KG) report(finding('panel-heavy', face.mark, { value: mass, limit: LIFT_KG }));
  for (const hazard of choice.material?.hazards ?? [])
    if (job.cutter.kind === 'laser') report(finding('panel-hazard', face.mark, { about: { hazard: HAZARDS[hazard] } }));
  return {
    ...emptyPanel(face, form, choice, loop, seats.edges),
    frame: seatFrame(loop, choice, seats),
    outline: toPoints(outline),
    holes: row.holes,
    engraving: engraved?.strokes ?? [],
    area,
    mass,
    holding: sayHold(hold),
    hold,
    makeable: choice.material !== null,
  };
}

const KG_PER_MM3 = 1e-9; // times kg/m³
/** Most that one person lifts on a site: 20 to 25 kg in common guidance; common practice, no source. */
const LIFT_KG = 20;
/** Least distance of a hole's middle from the edge over its diameter; common practice for acrylic and plywood, no source. */
const EDGE_OVER_DIAMETER = 1.5;
const HAZARDS: Readonly<Record<string, string>> = {
  'laser-chlorine': 'its material gives off chlorine under a laser: never cut it on one',
  'laser-fire': 'its material burns and soots under a laser: do not cut it on one',
};

/** The frame of the outline: in the plane of the axes, or in the plane where the panel rests on the struts. */
function seatFrame(loop: FaceLoop, choice: PanelChoice, seats: Seats): PanelPart['frame'] {
  const height = choice.seating === 'between' ? 0 : choice.seating === 'over' ? seats.low : seats.high;
  return { ...loop.frame, origin: addScaled(loop.frame.origin, loop.frame.z, height) };
}

interface Seats {
  readonly edges: readonly PanelEdge[];
  readonly insets: readonly number[];
  readonly movements: readonly number[];
  /** Heights of the panel's faces over the plane of the axes. */
  readonly low: number;
  readonly high: number;
}

/** Heights of the panel over the plane of the strut axes: in it, or resting on the strut that stands out most. */
function heights(setting: PanelSetting, loop: FaceLoop, choice: PanelChoice): readonly [number, number] {
  const t = choice.thickness;
  if (choice.seating === 'between') return [-t / 2, t / 2];
  const reach = Math.max(
    0,
    ...membersOf(setting.topology, loop).map((m) => {
      const section = m === null ? null : setting.sections[m]!;
      return section ? reachAlong(section, setting.axes[m!]!, loop.frame.z) : 0;
    }),
  );
  return choice.seating === 'over' ? [reach, reach + t] : [-reach - t, -reach];
}

/** The member along each edge of the loop, by index; null: none. */
function membersOf(topology: Topology, loop: FaceLoop): (number | null)[] {
  return loop.nodes.map((node, i) => {
    const next = loop.nodes[(i + 1) % loop.nodes.length]!;
    const bar = topology.barsAt[topology.nodeIndex.get(node)!]!.find((b) => b.far.mark === next);
    return bar ? bar.memberIndex : null;
  });
}

function edgesOf(setting: PanelSetting, f: number, loop: FaceLoop, choice: PanelChoice): Seats {
  const { topology, job } = setting;
  const [low, high] = heights(setting, loop, choice);
  const strain = movementStrain(job, choice.material);
  const insets: number[] = [];
  const movements: number[] = [];
  const edges = membersOf(topology, loop).map((m, i): PanelEdge => {
    const into = inward(loop, i);
    const section = m === null ? null : setting.sections[m]!;
    const axes = m === null ? null : setting.axes[m]!;
    const across = m === null ? [] : neighboursAcross(setting, f, m, { into, normal: loop.frame.z });
    const [a, b] = [loop.corners[i]!, loop.corners[(i + 1) % loop.corners.length]!];
    const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
    // The frame's origin is the middle of the corners: what grows, grows from about there.
    const movement = (strain * Math.abs(a[0] * b[1] - a[1] * b[0])) / (length || 1);
    const seat = edgeInset(
      {
        seating: choice.seating,
        thickness: choice.thickness,
        low,
        high,
        strutReach: section && axes ? reachInSlab(section, axes, into, loop.frame.z, low, high) : null,
        strutHalf: section && axes ? reachAlong(section, axes, into) : 0,
        dihedrals: across.map((n) => n.dihedral),
        gap: job.panels.gap_mm,
        movement,
      },
      job.panels.edges,
    );
    insets.push(seat.inset);
    movements.push(movement);
    const nearest = across[0] ?? null;
    return {
      length,
      from: loop.nodes[i]!,
      to: loop.nodes[(i + 1) % loop.nodes.length]!,
      strut: m === null ? null : topology.truss.members[m]!.mark,
      neighbour: nearest?.mark ?? null,
      dihedral: nearest?.dihedral ?? null,
      bevel: seat.bevel,
      inset: seat.inset,
    };
  });
  return { edges, insets, movements, low, high };
}

/** Panels on the other side of a strut, the one that leaves the least room first. */
function neighboursAcross(
  setting: PanelSetting,
  f: number,
  member: number,
  own: { readonly into: ReturnType<typeof inward>; readonly normal: FaceLoop['frame']['z'] },
): { readonly mark: string; readonly dihedral: number }[] {
  const { topology, forms } = setting;
  const [from, to] = topology.truss.members[member]!.ends;
  return topology.facesAlong[member]!.flatMap((g) => {
    const face = topology.truss.faces[g]!;
    const form = forms[g]!;
    if (g === f || !face.panel || !form.normal) return [];
    const loop = faceLoop(topology, face.nodes, form.origin, form.normal);
    const i = loop.nodes.findIndex((mark, k) => {
      const next = loop.nodes[(k + 1) % loop.nodes.length]!;
      return (mark === from && next === to) || (mark === to && next === from);
    });
    if (i < 0) return [];
    return [{ mark: face.mark, dihedral: dihedralAngle(own, { into: inward(loop, i), normal: form.normal }) }];
  }).sort((a, b) => openingAngle(a.dihedral) - openingAngle(b.dihedral));
}

/** Corners nearer than this are one: ten steps of the integer grid of the polygon library. mm */
const SAME_CORNER = 1e-4;

function outlineOf(
  setting: PanelSetting,
  hubAt: ReadonlyMap<string, HubPart>,
  loop: FaceLoop,
  choice: PanelChoice,
  seats: Seats,
): Ring[] {
  const { job } = setting;
  const { origin, x, y } = loop.frame;
  let rings = movedEdges(loop.corners, seats.insets);
  const movement = Math.max(0, ...seats.movements);
  const radius = cornerRadius(job, choice);
  const clear = Math.max(job.panels.gap_mm + movement, radius);
  loop.nodes.forEach((node, i) => {
    const hub = hubAt.get(node);
    if (!hub) return;
    const solid = setting
      .hubOutline(hub, { origin, x, y, from: seats.low, to: seats.high })
      .map((polygon) => tidyRing(toRing(polygon), SAME_CORNER))
      .filter((ring) => ring.length >= 6);
    rings = cutCorner(rings, loop.corners, i, solid, clear, job.panels.corner);
  });
  if (radius > 0) rings = rings.map((r) => roundInsideCorners(r, radius));
  // A speck that a cut leaves beside the panel is waste, not a piece: less than a thickness square.
  const speck = choice.thickness * choice.thickness;
  return rings.map((r) => tidyRing(r, SAME_CORNER)).filter((r) => r.length >= 6 && areaOf([r]) > speck);
}

/** Radius at inside corners where the job gives none: a laser in acrylic 0.5 mm (common practice), a router its tool's. */
export function cornerRadius(job: Job, choice: PanelChoice): number {
  if (job.panels.cornerRadius_mm !== undefined) return job.panels.cornerRadius_mm;
  if (job.cutter.kind === 'router') return job.cutter.tool_mm / 2;
  return choice.material?.family === 'acrylic' || choice.material?.family === 'plastic-sheet' ? 0.5 : 0;
}

/** Inward corners filled to the radius, outward ones left sharp: out with sharp corners, back with round ones. */
function roundInsideCorners(ring: Ring, radius: number): Ring {
  const convex = toPoints(ring).every((b, i, all) => {
    const [a, c] = [all[(i + all.length - 1) % all.length]!, all[(i + 1) % all.length]!];
    return (b[0] - a[0]) * (c[1] - b[1]) - (b[1] - a[1]) * (c[0] - b[0]) >= 0;
  });
  if (convex) return ring;
  const back = offsetRings(offsetRings([ring], radius, 'mitre'), -radius, 'round');
  return back.length > 0 ? back.reduce((a, b) => (signedArea(b) > signedArea(a) ? b : a)) : ring;
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
  form: FaceForm,
  choice: PanelChoice,
  loop: FaceLoop | null,
  edges: readonly PanelEdge[] = [],
): PanelPart {
  return {
    mark: face.mark,
    face: face.mark,
    group: face.group,
    material: choice.material,
    thickness: choice.thickness,
    seating: choice.seating,
    flatness: form.flatness,
    frame: loop?.frame ?? { origin: form.origin, x: [1, 0, 0], y: [0, 1, 0], z: [0, 0, 1] },
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
