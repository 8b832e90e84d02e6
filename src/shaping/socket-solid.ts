import { type BasePlate, INTO_PLATE, levelRing } from '../detailing/systems/base-plate.js';
import { grow, type Half, largest, outlineOf, ringPoints, type Sleeve, smallest } from '../detailing/systems/sleeve.js';
import type { Vec3 } from '../maths/vec3.js';
import type { Channel } from './channels.js';
import { type Cradle, cradleCutters } from './cradle.js';
import { addLettering } from './engraving.js';
import type { HubSpace } from './hub-space.js';
import type { Bench, Manifold } from './kernel.js';
import type { MarkPlace } from './mark-places.js';
import { MeshBuilder } from './mesh-builder.js';
import { placedAlong, sidesFor, transformed } from './placed.js';

/** What is cut from a socket hub besides its bores and marks. */
export interface HubCuts {
  readonly channels: readonly Channel[];
  readonly cradles: readonly Cradle[];
  readonly chamfer: number;
}

/**
 * The solid of a socket hub but for its marks, relative to its node, in the truss's axes: the outsides of the sleeves and the body,
 * united, less the struts' paths and the channels. Each strut's path is cut from all of the hub, so that no neighbour's cone or body can
 * stand in it; no cutter shares a face with a piece.
 */
export function socketSolid(bench: Bench, space: HubSpace, cuts: HubCuts): Manifold {
  const { kernel } = bench;
  const pieces = space.sleeves.map((s) => sleeveSolid(bench, s, cuts.chamfer));
  const body = bodySolid(bench, space);
  if (body) pieces.push(body);
  if (space.shape.base) pieces.push(plateSolid(bench, space.shape.base, cuts.chamfer));
  for (const arm of space.shape.clamp?.arms ?? [])
    pieces.push(bench.hold(kernel.Manifold.hull(arm.points.map((p) => [p[0], p[1], p[2]])), 'arm'));
  const outside = bench.hold(kernel.Manifold.union(pieces), 'outside');
  const paths = space.sleeves.map((s) => pathSolid(bench, s, cuts.chamfer, space.reach + 1));
  const last = [
    ...cuts.channels.map((c) => channelSolid(bench, c)),
    ...cuts.cradles.flatMap((c) => cradleCutters(bench, space, c)),
  ];
  const cores = space.sleeves.filter((s) => !s.hollow).map((s) => coreSolid(bench, s, cuts.chamfer));
  // Spigots stand in their own struts' paths: they are put in after the paths are cut, and bored with the rest.
  const hub =
    cores.length === 0
      ? bench.hold(kernel.Manifold.difference([outside, ...paths, ...last]), 'hub')
      : withCores(bench, outside, paths, cores, last);
  for (const solid of [...pieces, outside, ...paths, ...cores, ...last]) bench.free(solid);
  return hub;
}

/**
 * A hub with its marks and its bores widened.
 *
 * @param widened what each sleeve's bore is widened by across, mm, in the sleeves' order
 */
export function finishedSolid(
  bench: Bench,
  space: HubSpace,
  hub: Manifold,
  marks: readonly MarkPlace[],
  widened: readonly number[],
  chamfer: number,
): Manifold {
  const cutters = space.sleeves.flatMap((s, i) => [
    ...letteringSolid(bench, s, i, marks),
    ...(s.hollow && widened[i]! > LEAST_WIDER ? [widerBore(bench, s, widened[i]! / 2, chamfer)] : []),
  ]);
  if (cutters.length === 0) return hub;
  const finished = bench.hold(bench.kernel.Manifold.difference([hub, ...cutters]), 'finished hub');
  for (const solid of cutters) bench.free(solid);
  return finished;
}

/** Less than this across is left, mm: no printer steps so finely, and shells so thin are not cut cleanly. */
const LEAST_WIDER = 0.04;
/** How far a widened bore's floor lies under the first one's, mm: the two share no face. */
const UNDER_FLOOR = 0.02;

/** A bore grown by `by` on every side, its mouth's chamfer with it. */
function widerBore(bench: Bench, s: Sleeve, by: number, chamfer: number): Manifold {
  const n = sidesFor(largest(s.outer));
  const ring = (z: number, half: Half) => ({ z, outline: outlineOf(half, n) });
  const c = chamferOf(s, chamfer);
  const mesh = new MeshBuilder();
  mesh.loft([
    ring(s.stop - UNDER_FLOOR, grow(s.inner, by)),
    ring(s.mouth - c, grow(s.inner, by)),
    ring(s.mouth + PAST_MOUTH, grow(s.inner, by + (c > 0 ? c + PAST_MOUTH : 0))),
  ]);
  return placedAlong(bench, mesh, s, 'wider bore');
}

function withCores(
  bench: Bench,
  outside: Manifold,
  paths: readonly Manifold[],
  cores: readonly Manifold[],
  last: readonly Manifold[],
): Manifold {
  const { Manifold } = bench.kernel;
  const bored = bench.hold(Manifold.difference([outside, ...paths]), 'hub');
  const cored = bench.hold(Manifold.union([bored, ...cores]), 'spigots');
  const hub = bench.hold(Manifold.difference([cored, ...last]), 'hub');
  bench.free(bored);
  bench.free(cored);
  return hub;
}

/** A spigot or plate from inside its shoulder to its end, which is chamfered to lead the strut on. */
function coreSolid(bench: Bench, s: Sleeve, chamfer: number): Manifold {
  const n = sidesFor(largest(s.rootHalf));
  const ring = (z: number, half: Half) => ({ z, outline: outlineOf(half, n) });
  const c = Math.min(Math.max(chamfer, LEAD_IN), smallest(s.outer) / 3, s.socket.depth / 4);
  const mesh = new MeshBuilder();
  mesh.loft([
    ring((s.root + s.stop) / 2, grow(s.outer, -0.02)),
    ring(s.stop - 0.01, s.outer),
    ring(s.mouth - c, s.outer),
    ring(s.mouth, grow(s.outer, -c)),
  ]);
  return placedAlong(bench, mesh, s, `spigot ${s.socket.strut}`);
}

/** Chamfer that leads a tube on, mm; common practice, no source. */
const LEAD_IN = 1;

function bodySolid(bench: Bench, space: HubSpace): Manifold | null {
  const points = space.sleeves.flatMap((s) =>
    s.rings.flatMap(([at, half]) => ringPoints(s.socket, at, half, sidesFor(largest(half)))),
  );
  const { base } = space.shape;
  if (base) points.push(...levelRing(base.top - INTO_PLATE, base.pedestal, sidesFor(base.pedestal)));
  if (points.length === 0) return null;
  return bench.hold(bench.kernel.Manifold.hull(points.map((p) => [p[0], p[1], p[2]])), 'body');
}

/** A foot's plate, chamfered below against the squeezed first layer. */
function plateSolid(bench: Bench, base: BasePlate, chamfer: number): Manifold {
  const n = sidesFor(base.radius);
  const under = base.top - base.thickness;
  const c = Math.min(chamfer, base.thickness / 3);
  const mesh = new MeshBuilder();
  mesh.loft([
    { z: under, outline: outlineOf(base.radius - c, n) },
    { z: under + c + 1e-3, outline: outlineOf(base.radius, n) },
    { z: base.top, outline: outlineOf(base.radius, n) },
  ]);
  return transformed(bench, mesh, [1, 0, 0], [0, 1, 0], [0, 0, 1], [0, 0, 0], 'plate');
}

/** The path of a strut: the bore from its stop, widened at the mouth, and on beyond whatever else the hub has there. */
function pathSolid(bench: Bench, s: Sleeve, chamfer: number, to: number): Manifold {
  const n = sidesFor(largest(s.outer));
  const ring = (z: number, half: Half) => ({ z, outline: outlineOf(half, n) });
  const c = s.hollow ? chamferOf(s, chamfer) : 0;
  const mesh = new MeshBuilder();
  mesh.loft([
    ring(s.stop, s.inner),
    ring(s.mouth - c, s.inner),
    // The slope runs on past the mouth, so that its rim is cut and not shared.
    ...(c > 0 ? [ring(s.mouth + PAST_MOUTH, grow(s.inner, c + PAST_MOUTH))] : []),
    // Beyond its own rim the path is no wider than the strut needs: it may run through a neighbour's wall there.
    ...(c > 0 ? [ring(s.mouth + 2 * PAST_MOUTH, s.inner)] : []),
    ring(Math.max(to, s.mouth + 1), s.inner),
  ]);
  return placedAlong(bench, mesh, s, 'path');
}

const PAST_MOUTH = 0.1;

const chamferOf = (s: Sleeve, chamfer: number): number =>
  Math.max(0, Math.min(chamfer, s.socket.wall / 2 - 0.05, s.socket.depth / 4));

/** The outside of a sleeve, from its root to its mouth. */
function sleeveSolid(bench: Bench, s: Sleeve, chamfer: number): Manifold {
  const n = sidesFor(largest(s.outer));
  const ring = (z: number, half: Half) => ({ z, outline: outlineOf(half, n) });
  const mesh = new MeshBuilder();
  if (!s.hollow) {
    // Past the stop, where the path is cut: the shoulder is a clean cut and no shared face.
    mesh.loft([ring(s.root, grow(s.rootHalf, ROOT_INSIDE)), ring(s.stop + 0.2, s.rootHalf)]);
    return placedAlong(bench, mesh, s, `shoulder ${s.socket.strut}`);
  }
  const c = chamferOf(s, chamfer);
  mesh.loft([
    ring(s.root, grow(s.outer, ROOT_INSIDE)),
    ...(s.coneFoot > s.root ? [ring(s.coneFoot, s.cone)] : []),
    ...(s.coneTop > s.coneFoot ? [ring(s.coneTop, s.outer)] : []),
    ...(c > 0 ? [ring(s.mouth - c, s.outer), ring(s.mouth, grow(s.outer, -c))] : [ring(s.mouth, s.outer)]),
  ]);
  return placedAlong(bench, mesh, s, `sleeve ${s.socket.strut}`);
}

/** The root is drawn in a little, mm, so that its edge lies in no face of the body. */
const ROOT_INSIDE = -0.07;

function channelSolid(bench: Bench, c: Channel): Manifold {
  const [u, v] = frameOf(c.direction);
  const mesh = new MeshBuilder();
  const outline = outlineOf(c.radius, CHANNEL_SIDES);
  mesh.loft([
    { z: 0, outline },
    { z: c.length, outline },
  ]);
  return transformed(bench, mesh, u, v, c.direction, c.from, 'channel');
}

const CHANNEL_SIDES = 12;

function frameOf(d: Vec3): [Vec3, Vec3] {
  const least: Vec3 = Math.abs(d[0]) < 0.6 ? [1, 0, 0] : [0, 1, 0];
  const u: Vec3 = [
    d[1] * least[2] - d[2] * least[1],
    d[2] * least[0] - d[0] * least[2],
    d[0] * least[1] - d[1] * least[0],
  ];
  const l = Math.hypot(u[0], u[1], u[2]);
  const unit: Vec3 = [u[0] / l, u[1] / l, u[2] / l];
  return [unit, [d[1] * unit[2] - d[2] * unit[1], d[2] * unit[0] - d[0] * unit[2], d[0] * unit[1] - d[1] * unit[0]]];
}

function letteringSolid(bench: Bench, s: Sleeve, i: number, marks: readonly MarkPlace[]): Manifold[] {
  const mesh = new MeshBuilder();
  for (const m of marks) if (m.sleeve === i) addLettering(mesh, bench.kernel, m.text, m.lettering, m.surface);
  return mesh.empty ? [] : [placedAlong(bench, mesh, s, 'marks')];
}
