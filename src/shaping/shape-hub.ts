import { type ClampParts, PARTING } from '../detailing/systems/clamp-parts.js';
import { hubShape } from '../detailing/systems/hub-shape.js';
import { nodeSystem } from '../detailing/systems/index.js';
import { boreAllowance, LEAST_WALL } from '../detailing/systems/printing.js';
import { dot } from '../maths/vec3.js';
import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { HubPart } from '../model/parts.js';
import type { ShapedHub, ShapedPiece, WeakestSection } from '../model/shaped.js';
import type { Channel } from './channels.js';
import { type Cradle, capSolid, cradleOf } from './cradle.js';
import { bushingSleeves, bushings, guideHalves } from './drilling-guide.js';
import { channelsOf } from './hub-channels.js';
import { marksOf } from './hub-marks.js';
import { HubSpace } from './hub-space.js';
import { Bench, loadKernel, type Manifold, SolidFailed } from './kernel.js';
import { layDown } from './lay-down.js';
import { weakestSection } from './measure-sections.js';
import { type MeasuredWall, measureWalls } from './measure-walls.js';
import { openEdges } from './open-edges.js';
import { chooseLie, type Lie } from './orientation.js';
import { finishedSolid, socketSolid } from './socket-solid.js';

/**
 * Makes the solid of a hub as it is printed. A hub that detailing found not makeable, or that is not printed, has no pieces and no findings of its own.
 *
 * @param tension largest tension of each socket's strut in N, in the sockets' order; absent: all alike
 */
export async function shapeHub(hub: HubPart, job: Job, tension?: readonly number[]): Promise<ShapedHub> {
  if (!hub.makeable || nodeSystem(hub.system)?.notPrinted) return { mark: hub.mark, pieces: [], findings: [] };
  const bench = new Bench(await loadKernel());
  const findings: Finding[] = [];
  try {
    if (hub.system === 'drilled-ball') return shapeGuide(bench, hub, job, findings);
    const space = new HubSpace(hubShape(hub, job));
    const channels = channelsOf(hub, job, space, findings);
    const cradles = cradlesOf(hub, job, space, findings);
    const marks = job.nodes.marks ? marksOf(hub, job, space, channels, cradles, findings) : [];
    const chamfer = job.nodes.chamfer_mm;
    const blank = socketSolid(bench, space, { channels, cradles, chamfer });
    const pulls = hub.sockets.map((s, i) => ({ direction: s.direction, tension: tension?.[i] ?? 1 }));
    if (space.shape.clamp) {
      // A half lies on its parting plane or across it; the bores in that plane are laid open and stand upright in neither.
      const level = hub.sockets.map(() => boreAllowance(job, 0));
      const solid = finishedSolid(bench, space, blank, marks, level, chamfer);
      return shapeHalves(bench, hub, job, solid, space, space.shape.clamp, findings);
    }
    const lie = space.shape.base
      ? ON_PLATE
      : chooseLie(blank, pulls, job.nodes.orientation, (box) => job.printers.some((p) => holds(p, box)));
    const widened = hub.sockets.map((s) => boreAllowance(job, dot(s.direction, lie.up)));
    const solid = finishedSolid(bench, space, blank, marks, widened, chamfer);
    const laid = [layDown(bench, solid, lie, hub.at, '')];
    for (const c of cradles) {
      const cap = capSolid(bench, space, c);
      laid.push(layDown(bench, cap, chooseLie(cap, [], ON_A_FACE), hub.at, `cap-${hub.sockets[c.sleeve]!.strut}`));
    }
    const main = laid[0];
    if (main) findings.push(...wallFindings(hub, main, space, channels, widened, job));
    return finish(hub, job, laid, findings, main ? weakestOf(hub, [main], space, findings) : null);
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
  space: HubSpace,
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
  const halves = laid.filter((p) => p !== null);
  return finish(hub, job, laid, findings, weakestOf(hub, halves, space, findings));
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
  const blank = socketSolid(bench, space, { channels: [], cradles: [], chamfer: 0 });
  const marked = finishedSolid(
    bench,
    space,
    blank,
    marks,
    space.sleeves.map(() => 0),
    0,
  );
  const laid = guideHalves(bench, space, hub, marked).map((half, i) =>
    layDown(bench, half, chooseLie(half, [], ON_A_FACE), hub.at, i === 0 ? 'guide-A' : 'guide-B'),
  );
  return finish(hub, job, laid, findings);
}

/** Pieces that are closed, with what is to be said of their sizes. */
function finish(
  hub: HubPart,
  job: Job,
  laid: readonly (ShapedPiece | null)[],
  findings: Finding[],
  weakest: WeakestSection | null = null,
): ShapedHub {
  const pieces = laid.filter((p) => p !== null);
  const faults = pieces
    .map((p) => openEdges(p.positions, p.triangles))
    .reduce((a, b) => a + b, laid.length - pieces.length);
  for (const piece of pieces) findings.push(...sizeFindings(hub, piece, job));
  if (faults > 0) findings.push(finding('mesh-open', hub.mark, { value: faults, limit: 0 }));
  return { mark: hub.mark, pieces: faults === 0 ? pieces : [], findings, weakest };
}

/** Share of a section that chords of polygons and letters may cost it. */
const SECTION_SLACK = 0.02;

function weakestOf(
  hub: HubPart,
  pieces: readonly ShapedPiece[],
  space: HubSpace,
  findings: Finding[],
): WeakestSection | null {
  const weakest = weakestSection(pieces, space.sleeves, hub.at);
  if (weakest && weakest.area < weakest.needed * (1 - SECTION_SLACK))
    findings.push(
      finding('section-weak', hub.mark, {
        value: weakest.area,
        limit: weakest.needed,
        about: { strut: weakest.strut, where: weakest.where },
      }),
    );
  return weakest;
}

/** What a wall may fall short of the process's least by, mm: chords of polygons. */
const WALL_SLACK = 0.05;

/** The thinnest wall of the hub as it was made, where it is less than the process prints. */
function wallFindings(
  hub: HubPart,
  piece: ShapedPiece,
  space: HubSpace,
  channels: readonly Channel[],
  widened: readonly number[],
  job: Job,
): Finding[] {
  const limit = LEAST_WALL[job.nodes['process']];
  const walls = measureWalls(piece, space.sleeves, channels, hub.at, widened);
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
