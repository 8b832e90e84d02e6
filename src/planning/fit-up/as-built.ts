import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import { roundDownToStep } from '../../detailing/saw.js';
import { distance, type Vec3 } from '../../maths/vec3.js';
import type { Job } from '../../model/job/index.js';
import type { Parts, StrutPart } from '../../model/parts.js';
import type { Topology } from '../../model/topology.js';
import { figureOf } from '../../statics/analyse/figure.js';
import { ROUNDED } from '../../statics/analyse/states.js';
import { countStates } from '../../statics/state-counts.js';
import { loopsOf } from './loops.js';

/** What was measured on what is already made: cut lengths of struts, places of nodes in the truss's axes; mm. */
export interface Measured {
  readonly lengths: ReadonlyMap<string, number>;
  readonly nodes: ReadonlyMap<string, Vec3>;
}

/** A strut that is not yet cut: its length as planned and as it must be now. */
export interface Correction {
  readonly mark: string;
  readonly planned_mm: number;
  readonly corrected_mm: number;
}

/**
 * New cut lengths for the struts that were not measured. Between two measured nodes the length follows from their distance.
 * Otherwise the loops that measured struts are in must close: the least change of the others with S' (e + d) = 0 over the
 * states of self-stress S. Rounded down to the saw's step. Struts without a planned length are left out.
 */
export function correctCuts(topology: Topology, parts: Parts, job: Job, measured: Measured): readonly Correction[] {
  const change = new Float64Array(parts.struts.length);
  const known = new Uint8Array(parts.struts.length);
  parts.struts.forEach((s, i) => {
    const length = measured.lengths.get(s.mark);
    if (length !== undefined && s.cutLength !== null) {
      change[i] = length - s.cutLength;
      known[i] = 1;
    }
    const [a, b] = s.ends.map((e) => measured.nodes.get(e.node));
    if (length === undefined && a && b) {
      change[i] = distance(a, b) - s.axisLength;
      known[i] = 2;
    }
  });
  closeLoops(topology, change, known);
  return parts.struts.flatMap((s, i): Correction[] =>
    s.cutLength === null || known[i] === 1
      ? []
      : [
          {
            mark: s.mark,
            planned_mm: s.cutLength,
            corrected_mm: roundDownToStep(wantedLength(s, job) + change[i]!, job.saw.step_mm),
          },
        ],
  );
}

/** Before it went down to the saw's step: what that took away can still be given back. */
const wantedLength = (s: StrutPart, job: Job): number =>
  s.axisLength - s.ends[0].setback! - s.ends[1].setback! - 2 * job.saw.endFloat_mm;

/** Adds to the free entries of `change` the least that closes every loop with a free strut in it. */
function closeLoops(topology: Topology, change: Float64Array, known: Uint8Array): void {
  const loops = loopsOf(countStates(figureOf(topology), ROUNDED)).filter((l) => l.indices.some((i) => !known[i]));
  if (loops.length === 0 || !known.some((k) => k > 0)) return;
  const rows = loops.map((l) => {
    const row = new Float64Array(change.length);
    l.indices.forEach((i, p) => {
      row[i] = l.values[p]!;
    });
    return row;
  });
  const right = Matrix.columnVector(
    rows.map((r) => -r.reduce((sum, v, i) => sum + (known[i] ? v * change[i]! : 0), 0)),
  );
  const gram = Matrix.zeros(rows.length, rows.length);
  rows.forEach((a, i) => {
    rows.forEach((b, j) => {
      gram.set(
        i,
        j,
        a.reduce((sum, v, k) => sum + (known[k] ? 0 : v * b[k]!), 0) + (i === j ? DAMPING * gramScale(a) : 0),
      );
    });
  });
  const y = new CholeskyDecomposition(gram).solve(right);
  for (let i = 0; i < change.length; i++)
    if (!known[i]) change[i] = rows.reduce((sum, r, k) => sum + r[i]! * y.get(k, 0), 0);
}

/** Loops that share all their free struts would leave the equations without an answer: this much of their own weight settles them. */
const DAMPING = 1e-9;
const gramScale = (row: Float64Array): number => row.reduce((sum, v) => sum + v * v, 0);
