import { type ClampParts, IN_PLANE, PARTING } from '../detailing/systems/clamp-parts.js';
import { hubShape } from '../detailing/systems/hub-shape.js';
import { LEAST_WALL } from '../detailing/systems/printing.js';
import { dot } from '../maths/vec3.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { HubPart } from '../model/parts.js';
import type { ShapedHub, ShapedPiece } from '../model/shaped.js';
import { boltHolesOf, type Channel, pinOf, plateHolesOf, screwHolesOf, ventOf } from './channels.js';
import { type Cradle, capSolid, cradleOf } from './cradle.js';
import { bushingSleeves, bushings, guideHalves } from './drilling-guide.js';
import { HubSpace } from './hub-space.js';
import { Bench, loadKernel, type Manifold, SolidFailed } from './kernel.js';
import { layDown } from './lay-down.js';
import { letteringsFor, type MarkPlace, placeMark, sideTowards } from './mark-places.js';
import { type MeasuredWall, measureWalls } from './measure-walls.js';
import { openEdges } from './open-edges.js';
import { chooseLie, type Lie } from './orientation.js';
import { socketSolid } from './socket-solid.js';

/**
 * Makes the solid of a hub as it is printed. A hub that detailing found not makeable has no pieces and no findings of its own.
 *
 * @param tension largest tension of each socket's strut in N, in the sockets' order; absent: all alike
 */
export async function shapeHub(hub: HubPart, job: Job, tension?: readonly number[]): Promise<ShapedHub> {
  if (!hub.makeable) return { mark: hub.mark, pieces: [], findings: [] };
  const bench = new Bench(await loadKernel());
  const findings: Finding[] = [];
  try {
    if (hub.system === 'drilled-ball') return shapeGuide(bench, hub, job, findings);
    const space = new HubSpace(hubShape(hub, job));
    const channels = channelsOf(hub, job, space, findings);
    const cradles = cradlesOf(hub, job, space, findings);
    const marks = job.nodes.marks ? marksOf(hub, job, space, channels, cradles, findings) : [];
    const solid = socketSolid(bench, space, { marks, channels, cradles, chamfer: job.nodes.chamfer_mm });
    const pulls = hub.sockets.map((s, i) => ({ direction: s.direction, tension: tension?.[i] ?? 1 }));
    if (space.shape.clamp) return shapeHalves(bench, hub, job, solid, space.shape.clamp, findings);
    const lie = space.shape.base
      ? ON_PLATE
      : chooseLie(solid, pulls, job.nodes.orientation, (box) => job.printers.some((p) => holds(p, box)));
    const laid = [layDown(bench, solid, lie, hub.at, '')];
    for (const c of cradles) {
      const cap = capSolid(bench, space, c);
      laid.push(layDown(bench, cap, chooseLie(cap, [], ON_A_FACE), hub.at, `cap-${hub.sockets[c.sleeve]!.strut}`));
    }
    const main = laid[0];
    if (main) findings.push(...wallFindings(hub, main, space, channels, job));
    return finish(hub, job, laid, findings);
  } catch (error) {
    if (!(error instanceof SolidFailed)) throw error;
    findings.push(finding('solid-failed', hub.mark, { about: { what: error.message } }));
    return { mark: hub.mark, pieces: [], findings };
  } finally {
    bench.clear();
  }
}

/** Fewer screws than this do not close a clamp. */
const LEAST_SCREWS = 2;

/** The halves of a clamp, each by itself on the bed. */
function shapeHalves(
  bench: Bench,
  hub: HubPart,
  job: Job,
  solid: Manifold,
  clamp: ClampParts,
  findings: Finding[],
): ShapedHub {
  if (clamp.screws.length < LEAST_SCREWS)
    findings.push(finding('clamp-not-screwed', hub.mark, { value: clamp.screws.length, limit: LEAST_SCREWS }));
  const [x, y, z] = clamp.normal;
  const laid = [1, -1].map((side, i) => {
    const half = bench.hold(solid.trimByPlane([side * x, side * y, side * z], PARTING / 2), 'half');
    return layDown(bench, half, chooseLie(half, [], ON_A_FACE), hub.at, i === 0 ? 'A' : 'B');
  });
  return finish(hub, job, laid, findings);
}

/** A drilled ball itself is not printed: its guide is, in two halves, each bushing with its marks. */
function shapeGuide(bench: Bench, hub: HubPart, job: Job, findings: Finding[]): ShapedHub {
  const guide = { ...hub, sockets: bushings(hub) };
  const space = new HubSpace({
    sleeves: guide.sockets.flatMap((s) => bushingSleeves(s, hub)),
    base: null,
    clamp: null,
  });
  const marks = job.nodes.marks ? marksOf(guide, job, space, [], [], findings) : [];
  const marked = socketSolid(bench, space, { marks, channels: [], cradles: [], chamfer: 0 });
  const laid = guideHalves(bench, space, hub, marked).map((half, i) =>
    layDown(bench, half, chooseLie(half, [], ON_A_FACE), hub.at, i === 0 ? 'guide-A' : 'guide-B'),
  );
  return finish(hub, job, laid, findings);
}

/** Pieces that are closed, with what is to be said of their sizes. */
function finish(hub: HubPart, job: Job, laid: readonly (ShapedPiece | null)[], findings: Finding[]): ShapedHub {
  const pieces = laid.filter((p) => p !== null);
  const faults = pieces
    .map((p) => openEdges(p.positions, p.triangles))
    .reduce((a, b) => a + b, laid.length - pieces.length);
  for (const piece of pieces) findings.push(...sizeFindings(hub, piece, job));
  if (faults > 0) findings.push(finding('mesh-open', hub.mark, { value: faults, limit: 0 }));
  return { mark: hub.mark, pieces: faults === 0 ? pieces : [], findings };
}

/** What a wall may fall short of the process's least by, mm: chords of polygons. */
const WALL_SLACK = 0.05;

/** The thinnest wall of the hub as it was made, where it is less than the process prints. */
function wallFindings(
  hub: HubPart,
  piece: ShapedPiece,
  space: HubSpace,
  channels: readonly Channel[],
  job: Job,
): Finding[] {
  const limit = LEAST_WALL[job.nodes['process']];
  const walls = measureWalls(piece, space.sleeves, channels, hub.at);
  const thinnest = walls.reduce<MeasuredWall | null>((a, b) => (a && a.thickness <= b.thickness ? a : b), null);
  if (!thinnest || thinnest.thickness >= limit - WALL_SLACK) return [];
  const where = `the socket of ${thinnest.strut}, ${thinnest.along.toFixed(1)} mm from its stop`;
  return [finding('wall-thin', hub.mark, { value: thinnest.thickness, limit, about: { where } })];
}

/** A foot stands as it is used: its plate's underside must be flat. */
const ON_PLATE: Lie = { up: [0, 0, 1], level: [1, 0, 0], contact: 0, stable: true };

/** Caps lie by the least overhang alone. */
const ON_A_FACE = { overhang: 1, height: 0.1, tension: 0 };

function cradlesOf(hub: HubPart, job: Job, space: HubSpace, findings: Finding[]): Cradle[] {
  const leastWall = LEAST_WALL[job.nodes['process']];
  return hub.sockets.flatMap((s, i) => {
    if (s.detail !== 'drop-in' || !space.sleeves[i]!.hollow) return [];
    const cradle = cradleOf(space, i, hub.outward, job.nodes.chamfer_mm, leastWall);
    if (!cradle) findings.push(finding('drop-in-blocked', hub.mark, { about: { strut: s.strut } }));
    return cradle ?? [];
  });
}

/** Whether a printer's usable volume takes a box, upright or turned by a quarter. */
function holds(printer: Job['printers'][number], [width, depth, height]: readonly [number, number, number]): boolean {
  const free = (size: number): number => size - 2 * printer.margin_mm;
  if (height > printer.height_mm) return false;
  if (printer.bed === 'circle') return Math.hypot(width, depth) <= free(printer.width_mm);
  const [a, b] = [free(printer.width_mm), free(printer.depth_mm)];
  return (width <= a && depth <= b) || (width <= b && depth <= a);
}

/** Share of a surface that hangs unsupported above which a note says so. */
const MUCH_OVERHANG = 0.3;

function sizeFindings(hub: HubPart, piece: ShapedPiece, job: Job): Finding[] {
  const findings: Finding[] = [];
  if (!job.printers.some((p) => holds(p, piece.box))) {
    const limit = Math.max(...job.printers.map((p) => Math.max(p.width_mm, p.depth_mm, p.height_mm)));
    findings.push(finding('node-too-large', hub.mark, { value: Math.max(...piece.box), limit }));
  }
  if (piece.overhang > MUCH_OVERHANG)
    findings.push(finding('much-overhang', hub.mark, { value: piece.overhang, limit: MUCH_OVERHANG }));
  return findings;
}

/** Corners of the polygons that bores and holes are made as, mm. */
const CHORDS = 0.1;

function channelsOf(hub: HubPart, job: Job, space: HubSpace, findings: Finding[]): Channel[] {
  const web = LEAST_WALL[job.nodes['process']] + CHORDS;
  const channels: Channel[] = [...plateHolesOf(space, web), ...screwHolesOf(space)];
  hub.sockets.forEach((s, i) => {
    if (s.pin > 0) {
      const pin = pinOf(space, i, web);
      if (pin) channels.push(pin);
      else findings.push(finding('pin-meets-bore', hub.mark, { value: s.pin, about: { strut: s.strut } }));
    }
    channels.push(...boltHolesOf(space, i));
    if (job.nodes.vent_mm > 0 && space.sleeves[i]!.hollow && s.detail !== 'drop-in') {
      const vent = ventOf(space, i, job.nodes.vent_mm, web);
      if (vent) channels.push(vent);
      else findings.push(finding('vent-left-out', hub.mark, { about: { strut: s.strut } }));
    }
  });
  return channels;
}

function marksOf(
  hub: HubPart,
  job: Job,
  space: HubSpace,
  channels: readonly Channel[],
  cradles: readonly Cradle[],
  findings: Finding[],
): MarkPlace[] {
  const places: MarkPlace[] = [];
  const opening = (i: number): Cradle | undefined => cradles.find((c) => c.sleeve === i);
  const taken = hub.sockets.map((_, i): { side: number; halfAngle: number }[] => {
    const c = opening(i);
    return [...(c ? [{ side: c.angle, halfAngle: c.halfAngle }] : []), ...partingSides(space, i)];
  });
  const leastWall = LEAST_WALL[job.nodes['process']];
  const place = (i: number, along: string, round: string, sense: 1 | -1): boolean => {
    const s = hub.sockets[i]!;
    const towards = sideTowards(s.direction, hub.outward);
    const found = placeMark(
      space,
      i,
      { along, round },
      letteringsFor(job, s.wall, leastWall),
      job.nodes.chamfer_mm,
      [sense * towards[0], sense * towards[1], sense * towards[2]],
      taken[i]!,
      channels,
      opening(i)?.groove?.from,
    );
    if (!found) return false;
    places.push(found);
    taken[i]!.push(found);
    return true;
  };
  const missing: string[] = [];
  hub.sockets.forEach((s, i) => {
    if (!place(i, s.strut, s.strut, 1)) missing.push(s.strut);
  });
  // The node's own mark with its revision: on the first sleeve that has room for it, the widest first.
  const own = `${hub.mark}/${hub.revision}`;
  const order = hub.sockets.map((_, i) => i).sort((a, b) => size(space, b) - size(space, a) || a - b);
  if (!order.some((i) => place(i, own, own, -1))) missing.push(own);
  hub.sockets.forEach((s, i) => {
    if (!place(i, `>${s.farNode}`, `^${s.farNode}`, -1)) missing.push(`>${s.farNode}`);
  });
  if (missing.length > 0)
    findings.push(finding('mark-left-out', hub.mark, { value: missing.length, about: { marks: missing.join(', ') } }));
  return places;
}

/** The two sides of a sleeve that a clamp's parting plane cuts, so that no mark crosses the cut. */
function partingSides(space: HubSpace, i: number): { side: number; halfAngle: number }[] {
  const { clamp, sleeves } = space.shape;
  const s = sleeves[i]!.socket;
  if (!clamp || Math.abs(dot(clamp.normal, s.direction)) > IN_PLANE) return [];
  const side = Math.atan2(dot(clamp.normal, s.z), dot(clamp.normal, s.y)) + Math.PI / 2;
  return [side, side + Math.PI].map((at) => ({ side: at, halfAngle: 0.1 }));
}

function size(space: HubSpace, i: number): number {
  const { outer, mouth, coneTop } = space.sleeves[i]!;
  return (typeof outer === 'number' ? 2 * outer : outer[0] + outer[1]) * (mouth - coneTop);
}
