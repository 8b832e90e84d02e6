import type { Topology } from '../../model/topology.js';
import { countSelfStress } from '../state-counts.js';
import { trussMatrix } from './equilibrium-matrix.js';

/**
 * Number of states of self-stress of the pin-jointed figure, as a free body or on its supports. Singular values of the
 * equilibrium matrix (unit directions) up to `cut` count as nought.
 */
export const selfStressStates = (topology: Topology, supported: boolean, cut: number): number =>
  countSelfStress(trussMatrix(topology, supported).figure, cut);
