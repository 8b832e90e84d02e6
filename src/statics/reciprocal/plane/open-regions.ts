import { addScaled, cross, dot, length, normalise, scale, subtract, type Vec3 } from '../../../maths/vec3.js';
import type { Topology } from '../../../model/topology.js';
import { OUTSIDE_CELL } from '../../../model/truss.js';
import type { RayEquation } from './lifting.js';
import type { PlaneFigure } from './plane-figure.js';
import type { Regions } from './regions.js';

/** A part of a vector below this is nought: unit vectors are compared. */
const NOUGHT = 1e-9;

/** Regions whose outside is cut open along the lines of loads and reactions: between each two of them lies a region of its own. */
export interface OpenRegions {
  readonly regions: Regions;
  readonly rays: readonly RayEquation[];
  /** By node: the outer regions on the left and right of the load's line, pointing away from the figure. */
  readonly sides: ReadonlyMap<number, readonly [left: number, right: number]>;
}

/**
 * Bow's notation: the outer region falls apart at every loaded or supported node of the rim. Across a load's line, pointing
 * outward, the surface folds like across a strut of that force, a_left - a_right = p turned by a right angle. A support leaves the fold
 * free in the directions that it holds. `inner` names a loaded or supported node that is not on the rim; then nothing is opened.
 */
export function openRegions(
  topology: Topology,
  figure: PlaneFigure,
  regions: Regions,
  loads: readonly Vec3[],
): OpenRegions | { readonly inner: string } {
  const { truss } = topology;
  const heldAt = new Map<number, Vec3[]>();
  for (const { node, fixed } of truss.supports) {
    const axes: Vec3[] = [];
    if (fixed.x) axes.push([1, 0, 0]);
    if (fixed.y) axes.push([0, 1, 0]);
    if (fixed.z) axes.push([0, 0, 1]);
    const inPlane = reactionsInPlane(axes, figure.z);
    if (inPlane.length > 0) heldAt.set(topology.nodeIndex.get(node)!, inPlane);
  }
  const acted = (i: number): boolean => length(loads[i]) > 0 || heldAt.has(i);
  const rim = regions.loops[regions.outer];
  const onRim = new Set(rim.map((h) => regions.edges.start[h]));
  const inner = truss.nodes.findIndex((_, i) => acted(i) && !onRim.has(i));
  if (inner >= 0) return { inner: truss.nodes[inner].mark };

  // The rim, turned so that it starts at a cut; a node that it passes twice is cut once.
  const cutAt = new Map<number, number>();
  rim.forEach((h, k) => {
    const i = regions.edges.start[h];
    if (acted(i) && !cutAt.has(i)) cutAt.set(i, k);
  });
  const cuts = [...cutAt.values()].sort((a, b) => a - b);
  if (cuts.length === 0) return { regions, rays: [], sides: new Map() };
  const left = Int32Array.from(regions.left);
  const loops = regions.loops.map((loop) => [...loop]);
  const marks = [...regions.marks];
  const partOf = (part: number): number => (part === 0 ? regions.outer : regions.loops.length + part - 1);
  cuts.forEach((start, part) => {
    const stop = cuts[(part + 1) % cuts.length];
    const r = partOf(part);
    const piece: number[] = [];
    for (let k = start, first = true; first || k !== stop; k = (k + 1) % rim.length, first = false) piece.push(rim[k]);
    for (const h of piece) left[h] = r;
    loops[r] = piece;
    marks[r] = cuts.length === 1 ? OUTSIDE_CELL : `${OUTSIDE_CELL} ${part + 1}`;
  });

  const sides = new Map<number, readonly [number, number]>();
  const rays: RayEquation[] = [];
  for (const [node, k] of cutAt) {
    const [right, before] = [left[rim[k]], left[rim[(k + rim.length - 1) % rim.length]]];
    sides.set(node, [before, right]);
    const p: readonly [number, number] = [dot(loads[node], figure.x), dot(loads[node], figure.y)];
    for (const t of freeDirections(heldAt.get(node) ?? [], figure)) {
      // The jump turned back by a right angle is the force: its part along t is the load's.
      rays.push({ left: before, right, direction: [-t[1], t[0]], value: p[0] * t[0] + p[1] * t[1] });
    }
  }
  return { regions: { ...regions, left, loops, marks }, rays, sides };
}

/** Directions in the plane that reactions along the held axes can take, without any part out of it. */
function reactionsInPlane(axes: readonly Vec3[], z: Vec3): Vec3[] {
  if (axes.length === 3) {
    const a = normalise(cross(z, Math.abs(z[0]) < 0.9 ? [1, 0, 0] : [0, 1, 0]));
    return [a, cross(z, a)];
  }
  const level = axes.filter((a) => Math.abs(dot(a, z)) < NOUGHT);
  if (level.length === 2 || axes.length < 2) return level;
  const [a, b] = axes;
  const d = subtract(scale(a, dot(b, z)), scale(b, dot(a, z)));
  return length(d) > NOUGHT ? [normalise(d)] : [];
}

/** In the plane's axes: the directions in which a node is not held. */
function freeDirections(held: readonly Vec3[], figure: PlaneFigure): (readonly [number, number])[] {
  if (held.length >= 2) return [];
  if (held.length === 0) {
    return [
      [1, 0],
      [0, 1],
    ];
  }
  const flat = addScaled(held[0], figure.z, -dot(held[0], figure.z));
  return [[-dot(flat, figure.y), dot(flat, figure.x)]];
}
