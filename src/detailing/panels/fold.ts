import { clearanceAt } from '../../maths/polygon/clearance.js';
import { movedRing, type Ring } from '../../maths/polygon/ring.js';
import type { PanelPart, Point2 } from '../../model/parts.js';
import type { PanelChoice } from './choice.js';
import { type FaceLoop, faceLoop, inward } from './face-loop.js';
import { dihedralAngle } from './neighbours.js';
import { type HubRings, hubRingsIn, outlineOf } from './outline.js';
import type { Patch } from './patches.js';
import { type Seats, seatsOf } from './seats.js';
import type { PanelSetting } from './setting.js';

/** What an outline is made from and what came of it, in one plane: the face's own, or the flat pattern of a folded one. */
export interface Figure {
  readonly loop: FaceLoop;
  readonly seats: Seats;
  /** Largest first. */
  readonly rings: readonly Ring[];
  readonly fold: NonNullable<PanelPart['fold']> | null;
}

/** The figure of a flat patch. */
export function flatFigure(setting: PanelSetting, patch: Patch, loop: FaceLoop, choice: PanelChoice): Figure {
  const seats = seatsOf(setting, patch, loop, choice);
  return { loop, seats, rings: outlineOf(setting, loop, choice, seats, hubRingsIn(setting, loop, seats)), fold: null };
}

/**
 * The flat pattern of a patch that is folded along one diagonal: the first half in its own plane, the second turned about
 * the diagonal into it. Insets and hubs of each half come from its own plane.
 */
export function foldedFigure(setting: PanelSetting, halves: readonly [Patch, Patch], choice: PanelChoice): Figure {
  const [a, b] = halves.map((half) => faceLoop(setting.topology, half.nodes, half.form.origin, half.form.normal!)) as [
    FaceLoop,
    FaceLoop,
  ];
  const [seatA, seatB] = [seatsOf(setting, halves[0], a, choice), seatsOf(setting, halves[1], b, choice)];
  const n = a.nodes.length;
  // Edge k of a is the diagonal; b runs it the other way.
  const k = a.nodes.findIndex((node, i) => diagonalAt(b, a.nodes[(i + 1) % n]!, node) >= 0);
  const j = diagonalAt(b, a.nodes[(k + 1) % n]!, a.nodes[k]!);
  const m = b.nodes.length;
  const [p, q] = [b.corners[(j + 1) % m]!, b.corners[j]!];
  const [u, v] = [a.corners[k]!, a.corners[(k + 1) % n]!];
  const turn = Math.atan2(v[1] - u[1], v[0] - u[0]) - Math.atan2(q[1] - p[1], q[0] - p[0]);
  const [c, s] = [Math.cos(turn), Math.sin(turn)];
  const shift: Point2 = [u[0] - (c * p[0] - s * p[1]), u[1] - (s * p[0] + c * p[1])];
  const unfold = ([x, y]: Point2): Point2 => [c * x - s * y + shift[0], s * x + c * y + shift[1]];

  // Round the pattern: a from the diagonal's end to its start, then b's own corners.
  const fromA = Array.from({ length: n }, (_, i) => (k + 1 + i) % n);
  const fromB = Array.from({ length: m - 2 }, (_, i) => (j + 2 + i) % m);
  const edgesA = fromA.slice(0, -1);
  const edgesB = Array.from({ length: m - 1 }, (_, i) => (j + 1 + i) % m);
  const pick = <T>(ofA: readonly T[], ofB: readonly T[], ia: readonly number[], ib: readonly number[]): T[] => [
    ...ia.map((i) => ofA[i]!),
    ...ib.map((i) => ofB[i]!),
  ];
  const loop: FaceLoop = {
    nodes: pick(a.nodes, b.nodes, fromA, fromB),
    points: pick(a.points, b.points, fromA, fromB),
    frame: a.frame,
    corners: [...fromA.map((i) => a.corners[i]!), ...fromB.map((i) => unfold(b.corners[i]!))],
  };
  const seats: Seats = {
    ...seatA,
    edges: pick(seatA.edges, seatB.edges, edgesA, edgesB),
    insets: pick(seatA.insets, seatB.insets, edgesA, edgesB),
    movements: pick(seatA.movements, seatB.movements, edgesA, edgesB),
  };
  const [hubsA, hubsB] = [hubRingsIn(setting, a, seatA), hubRingsIn(setting, b, seatB)];
  const hubs: HubRings = (node) => [
    ...(a.nodes.includes(node) ? hubsA(node) : []),
    ...(b.nodes.includes(node) ? hubsB(node).map((ring) => movedRing(ring, turn, shift[0], shift[1])) : []),
  ];
  const rings = outlineOf(setting, loop, choice, seats, hubs);
  const dihedral = dihedralAngle({ into: inward(a, k), normal: a.frame.z }, { into: inward(b, j), normal: b.frame.z });
  const line = rings[0] ? inside(rings[0], u, v) : null;
  return { loop, seats, rings, fold: line && { from: line[0], to: line[1], angle: Math.PI - dihedral } };
}

const diagonalAt = (loop: FaceLoop, from: string, to: string): number =>
  loop.nodes.findIndex((node, i) => node === from && loop.nodes[(i + 1) % loop.nodes.length] === to);

/** The part of the line from u to v that lies in the outline, from the first to the last of its points inside. */
function inside(ring: Ring, u: Point2, v: Point2): readonly [Point2, Point2] | null {
  const at = (t: number): Point2 => [u[0] + t * (v[0] - u[0]), u[1] + t * (v[1] - u[1])];
  const within = (t: number): boolean => clearanceAt([ring], ...at(t)) > 0;
  const steps = Array.from({ length: 201 }, (_, i) => i / 200).filter(within);
  if (steps.length === 0) return null;
  const edge = (inner: number, outer: number): number => {
    let [x, y] = [inner, outer];
    for (let i = 0; i < 40; i++) {
      const middle = (x + y) / 2;
      if (within(middle)) x = middle;
      else y = middle;
    }
    return x;
  };
  return [
    at(edge(steps[0]!, Math.max(0, steps[0]! - 1 / 200))),
    at(edge(steps.at(-1)!, Math.min(1, steps.at(-1)! + 1 / 200))),
  ];
}
