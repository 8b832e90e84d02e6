import type { SparseMatrix } from '../../maths/sparse/csc.js';
import type { Topology } from '../../model/topology.js';
import { figureOf } from '../analyse/figure.js';
import { type Freedoms, numberFreedoms } from '../freedoms.js';
import { equilibriumMatrix, type PinFigure } from '../pin-figure.js';

/** The truss as a pin-jointed figure on its supports or as a free body, with A t = p on its free freedoms (p: loads). */
export interface TrussMatrix {
  readonly figure: PinFigure;
  readonly freedoms: Freedoms;
  readonly matrix: SparseMatrix;
}

export function trussMatrix(topology: Topology, supported: boolean): TrussMatrix {
  const onSupports = figureOf(topology);
  const figure = supported || topology.truss.supports.length === 0 ? onSupports : freeOf(topology, onSupports);
  const freedoms = numberFreedoms(figure.fixed, 3);
  return { figure, freedoms, matrix: equilibriumMatrix(figure, freedoms) };
}

function freeOf(topology: Topology, onSupports: PinFigure): PinFigure {
  const fixed = Uint8Array.from(onSupports.fixed, (_, f) => (topology.barsAt[Math.floor(f / 3)].length === 0 ? 1 : 0));
  return { ...onSupports, fixed };
}
