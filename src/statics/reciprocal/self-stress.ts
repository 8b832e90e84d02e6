import { rightNullSpace } from '../../maths/sparse/null-space.js';
import { midpoint } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import { equilibriumMatrix } from './equilibrium-matrix.js';

/** States of self-stress of the pin-jointed figure, as a free body or on its supports. */
export interface SelfStress {
  readonly count: number;
  /** By state: forces by member index, orthonormal. */
  readonly states: readonly Float64Array[];
  /** Smallest singular value of the equilibrium matrix above the cut; null where not known. */
  readonly leastSingular: number | null;
}

/** Null space of the equilibrium matrix (unit directions), singular values up to `cut` counted as nought. */
export function selfStress(topology: Topology, supported: boolean, cut: number): SelfStress {
  const { matrix } = equilibriumMatrix(topology, supported);
  const points = Float64Array.from(
    topology.truss.members.flatMap((m) => [...midpoint(topology.at(m.ends[0]), topology.at(m.ends[1]))]),
  );
  const nulls = rightNullSpace(matrix, { points });
  const near = nulls.next.filter((n) => n.value <= cut);
  return {
    count: nulls.vectors.length + near.length,
    states: [...nulls.vectors, ...near.map((n) => n.vector)],
    leastSingular: nulls.next.find((n) => n.value > cut)?.value ?? null,
  };
}
