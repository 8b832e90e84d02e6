import type { Topology } from '../../model/topology.js';
import type { CellComplex } from './complex.js';
import { type FunctionSpace, functionSpace } from './function-space.js';
import { type QuadraticForces, quadraticForces } from './quadratic-forces.js';
import { reachedStates } from './reach.js';
import type { DiagramCounts } from './result.js';
import { selfStressStates } from './self-stress.js';

/** A state counts as self-stress up to this singular value, and to a few times what the faces' twist left in the functions. */
const ROUND_OFF_CUT = 1e-9;
const TWIST_FACTOR = 4;

/** Functions over the cells beside the states of self-stress, and how many of those the diagrams span. */
export function countSpace(
  topology: Topology,
  complex: CellComplex,
  space: FunctionSpace,
  q: QuadraticForces,
  loaded: boolean,
): DiagramCounts {
  const cut = space.largestNull > ROUND_OFF_CUT ? TWIST_FACTOR * space.largestNull : ROUND_OFF_CUT;
  const states = selfStressStates(topology, loaded, cut);
  const { V, E, F } = complex.euler;
  return {
    nodes: V,
    edges: E,
    faces: F,
    cells: complex.cells.length,
    dimension: space.dimension,
    selfStressStates: states,
    reached: loaded ? null : reachedStates(q, states),
    leastSingular: space.leastSingular,
  };
}

/** The same for a complex as it stands. */
export function countDiagrams(topology: Topology, complex: CellComplex): DiagramCounts {
  const space = functionSpace(topology, complex);
  return countSpace(
    topology,
    complex,
    space,
    quadraticForces(topology, complex, space.basis),
    complex.openEdges.length > 0,
  );
}
