import { fromTriplets, type SparseMatrix } from '../maths/sparse/csc.js';
import type { Freedoms } from './freedoms.js';

/** A pin-jointed figure as numbers: nodes x, y, z in mm; two node indices a bar; 1 for each held freedom, three a node. */
export interface PinFigure {
  readonly nodes: Float64Array;
  readonly ends: Int32Array;
  readonly fixed: Uint8Array;
}

/** Length of each bar in mm and its unit vector from the first end to the second, three a bar. */
export function barDirections(figure: PinFigure): { readonly lengths: Float64Array; readonly units: Float64Array } {
  const bars = figure.ends.length / 2;
  const lengths = new Float64Array(bars);
  const units = new Float64Array(3 * bars);
  for (let e = 0; e < bars; e++) {
    const a = 3 * figure.ends[2 * e];
    const b = 3 * figure.ends[2 * e + 1];
    const d = [0, 1, 2].map((k) => figure.nodes[b + k] - figure.nodes[a + k]);
    lengths[e] = Math.hypot(d[0], d[1], d[2]);
    for (let k = 0; k < 3; k++) units[3 * e + k] = lengths[e] > 0 ? d[k] / lengths[e] : 0;
  }
  return { lengths, units };
}

/**
 * The equilibrium matrix A, free freedoms x bars: A t = p for bar forces t (tension positive) and loads p, and Aᵀ d = e
 * for displacements d and elongations e (Pellegrino and Calladine, Int. J. Solids Struct. 22 (1986) 409-428).
 */
export function equilibriumMatrix(figure: PinFigure, freedoms: Freedoms): SparseMatrix {
  const { units } = barDirections(figure);
  const rows: number[] = [];
  const columns: number[] = [];
  const values: number[] = [];
  for (let e = 0; e < figure.ends.length / 2; e++)
    for (let s = 0; s < 2; s++)
      for (let k = 0; k < 3; k++) {
        const f = freedoms.of[3 * figure.ends[2 * e + s] + k];
        const u = units[3 * e + k];
        if (f < 0 || u === 0) continue;
        rows.push(f);
        columns.push(e);
        values.push(s === 0 ? -u : u);
      }
  return fromTriplets(freedoms.count, figure.ends.length / 2, rows, columns, values);
}
