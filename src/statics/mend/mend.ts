import { fitPlane } from '../../maths/plane-fit.js';
import type { Analysis } from '../../maths/sparse/analyse.js';
import { length, type Vec3 } from '../../maths/vec3.js';
import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import { FIT } from '../../model/tolerance.js';
import { topologyOf } from '../../model/topology.js';
import { GIVEN_CASE, type Truss } from '../../model/truss.js';
import { equilibriumOf, loadsOf } from '../equilibrium.js';
import { type BalanceFigure, balanceRows } from './balance-rows.js';
import { flatnessRows } from './flatness-rows.js';
import { mendDiagram } from './mend-diagram.js';
import { nearestOn } from './nearest-on.js';
import { emptyRows } from './row-list.js';

export interface MendOptions {
  /** What is put right. Default: both where forces are known, else flatness alone. */
  readonly what?: 'both' | 'flatness' | 'equilibrium';
  /** Marks of nodes that stay where they are, beside the supports. */
  readonly keep?: readonly string[];
  /** N by member index, tension positive; default: those of the file. */
  readonly forces?: Float64Array | null;
  /** `adjust`: forces may change as well, one share of the largest force counting as much as the same share of the mean strut; `keep`: they stay. */
  readonly forceChange?: 'adjust' | 'keep';
  /** Most that a node may move, mm; default 0.5. */
  readonly bound?: number;
  /** Most that a force may change, over the largest force; default 0.01. */
  readonly forceBound?: number;
  /** Wanted: distance of a corner from its face's plane over the mean strut, and residual at a node over the largest force. */
  readonly tolerance?: number;
}

export interface Movement {
  readonly node: string;
  /** mm */
  readonly by: Vec3;
  readonly distance: number;
}

export interface Mended {
  /** The mended truss; the one that came in where mending was refused. */
  readonly truss: Truss;
  readonly done: boolean;
  /** Every node that moves (or would have to), in the file's order. */
  readonly movements: readonly Movement[];
  /** N by member index, after mending; null where equilibrium was not mended. */
  readonly forces: Float64Array | null;
  /** Largest change of a force, N. */
  readonly forceChange: number;
  /** Before and after: largest flatness in mm, largest residual in N. */
  readonly before: MendState;
  readonly after: MendState;
  readonly steps: number;
  readonly findings: readonly Finding[];
}

export interface MendState {
  readonly flatness: number;
  readonly residual: number | null;
}

/** Two digits above what sums of doubles leave on a truss of thousands of struts. */
const TOLERANCE = 1e-11;
const MOST_STEPS = 40;
/** Past this many lengths of the mean strut a search has left the form that it was to mend. */
const ASTRAY = 1;

/**
 * Moves nodes as little as possible, in the sum of squares, until every face is flat and the forces balance the loads at every node
 * (or one of the two): Gauss-Newton on the equations of flatness and balance, each step to the point of the linearised
 * equations that lies nearest to where the nodes came from. Supports and chosen nodes stay. Refused, with the reason, where a node would
 * move or a force change by more than its bound, or where the equations cannot be met.
 */
export function mend(truss: Truss, options: MendOptions = {}): Mended {
  const topology = topologyOf(truss);
  const given =
    options.forces ??
    (truss.members.every((m) => m.force !== null) ? Float64Array.from(truss.members, (m) => m.force!) : null);
  const what = options.what ?? (given ? 'both' : 'flatness');
  const forces0 = what === 'flatness' ? null : given;
  const tolerance = options.tolerance ?? TOLERANCE;
  const bound = options.bound ?? FIT.flatnessWarn.value;
  const forceBound = options.forceBound ?? FIT.residualStop.value;

  const nodes = truss.nodes.length;
  const unit = topology.axisLength.reduce((sum, l) => sum + l, 0) / Math.max(1, truss.members.length) || 1;
  const largest = forces0?.reduce((most, t) => Math.max(most, Math.abs(t)), 0) || 1;
  const keep = new Set([...truss.supports.map((s) => s.node), ...(options.keep ?? [])]);
  const column = new Int32Array(nodes).fill(-1);
  let columns = 0;
  truss.nodes.forEach((node, i) => {
    if (keep.has(node.mark)) return;
    column[i] = columns;
    columns += 3;
  });
  const forceStart = columns;
  const adjust = forces0 !== null && options.forceChange !== 'keep';
  if (adjust) columns += truss.members.length;

  const faces =
    what === 'equilibrium' ? [] : truss.faces.map((f) => f.nodes.map((mark) => topology.nodeIndex.get(mark)!));
  const figure: BalanceFigure = {
    ends: truss.members.map((m) => m.ends.map((mark) => topology.nodeIndex.get(mark)!) as [number, number]),
    loads: loadsOf(topology, GIVEN_CASE),
    held: heldFreedoms(truss, topology.nodeIndex),
  };
  // Moves over the mean strut, then changes of force over the largest: nought where everything came from.
  let x: Float64Array = new Float64Array(columns);
  const at = (i: number): Vec3 => {
    const home = truss.nodes[i].at;
    const c = column[i];
    return c < 0 ? home : [home[0] + x[c] * unit, home[1] + x[c + 1] * unit, home[2] + x[c + 2] * unit];
  };
  const forcesNow = (): Float64Array | null =>
    forces0 && (adjust ? forces0.map((t, m) => t + x[forceStart + m] * largest) : forces0);
  const equationsNow = () => {
    const rows = emptyRows();
    for (const loop of faces) flatnessRows(loop, at, (i) => column[i], unit, rows);
    const now = forcesNow();
    if (now) {
      const forceColumn = (m: number): number => (adjust ? forceStart + m : -1);
      balanceRows(figure, now, at, (i) => column[i], forceColumn, unit, largest, rows);
    }
    return rows;
  };

  let analysis: Analysis | null = null;
  let equations = equationsNow();
  let miss = largestOf(equations.values);
  let steps = 0;
  while (miss > tolerance && steps < MOST_STEPS && columns > 0) {
    const nearest: ReturnType<typeof nearestOn> = nearestOn(equations, x, analysis);
    [x, analysis] = [nearest.x, nearest.analysis];
    steps++;
    if (largestOf(x) > ASTRAY) break;
    equations = equationsNow();
    const next = largestOf(equations.values);
    // Within a few digits of round-off the miss no longer falls.
    if (next > 0.5 * miss && miss < 100 * tolerance) {
      miss = Math.min(miss, next);
      break;
    }
    miss = next;
  }

  const forces = forcesNow();
  const moved = truss.nodes.map((node, i) => ({ ...node, at: column[i] < 0 ? node.at : at(i) }));
  const formed: Truss = {
    ...truss,
    nodes: moved,
    members: truss.members.map((m, i) => (forces && m.force !== null ? { ...m, force: forces[i] } : m)),
  };
  // Of a form that was left as it is the diagram stays too.
  const result = steps > 0 ? { ...formed, reciprocal: mendDiagram(formed) } : formed;
  const movements = truss.nodes.flatMap((node, i): Movement[] => {
    const by: Vec3 = [moved[i].at[0] - node.at[0], moved[i].at[1] - node.at[1], moved[i].at[2] - node.at[2]];
    return length(by) > 0 ? [{ node: node.mark, by, distance: length(by) }] : [];
  });
  const forceChange = forces && forces0 ? largestOf(forces.map((t, m) => t - forces0[m])) : 0;
  const before = stateOf(truss, forces0);
  const after = stateOf(result, forces);
  const findings: Finding[] = [];
  const farthest = movements.reduce<Movement | null>((far, m) => (!far || m.distance > far.distance ? m : far), null);
  if (!(miss <= 100 * tolerance)) {
    findings.push(
      finding('mend-not-reached', 'truss', {
        value: miss,
        limit: tolerance,
        about: { what: what === 'both' ? 'flatness or balance' : what },
      }),
    );
  }
  if (farthest && farthest.distance > bound) {
    findings.push(
      finding('mend-not-within-bound', 'truss', {
        value: farthest.distance,
        limit: bound,
        about: { node: farthest.node },
      }),
    );
  }
  if (forceChange > forceBound * largest) {
    findings.push(finding('mend-changes-forces', 'truss', { value: forceChange / largest, limit: forceBound }));
  }
  const done = findings.length === 0;
  return { truss: done ? result : truss, done, movements, forces, forceChange, before, after, steps, findings };
}

function heldFreedoms(truss: Truss, nodeIndex: ReadonlyMap<string, number>): Uint8Array {
  const held = new Uint8Array(3 * truss.nodes.length);
  for (const { node, fixed } of truss.supports) {
    const i = 3 * nodeIndex.get(node)!;
    for (const [k, on] of [fixed.x, fixed.y, fixed.z].entries()) if (on) held[i + k] = 1;
  }
  return held;
}

function stateOf(truss: Truss, forces: Float64Array | null): MendState {
  const topology = topologyOf(truss);
  const flatness = truss.faces.reduce(
    (most, face) => Math.max(most, fitPlane(face.nodes.map((mark) => topology.at(mark)))?.flatness ?? 0),
    0,
  );
  const limits = { residualWarn: FIT.residualWarn.value, residualStop: FIT.residualStop.value };
  return { flatness, residual: forces && equilibriumOf(topology, forces, limits).maxResidual };
}

function largestOf(values: ArrayLike<number>): number {
  let most = 0;
  for (let i = 0; i < values.length; i++) most = Math.max(most, Math.abs(values[i]));
  return most;
}
