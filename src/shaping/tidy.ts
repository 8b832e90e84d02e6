import type { Bench, Manifold } from './kernel.js';

/** Below this, mm, edges are collapsed: far below what prints; coarser makes solids that cross themselves. */
const SIMPLIFY = 1e-4;
/** Share of the volume that may be dropped as specks. */
const SPECK = 1e-3;

export interface Tidied {
  readonly solid: Manifold;
  /** Volume of the shells that were dropped over the whole. */
  readonly dropped: number;
}

/**
 * Cleans a solid at the single precision of the files: coplanar leftovers and short edges go, the vertices are rounded as a file
 * would round them and cleaned again, and of several shells the largest stays.
 */
export function tidy(bench: Bench, solid: Manifold, round: (vertices: Float32Array) => void): Tidied {
  const { Manifold } = bench.kernel;
  const original = bench.hold(solid.asOriginal(), 'tidy');
  const first = bench.hold(original.simplify(SIMPLIFY), 'tidy');
  bench.free(original);
  const mesh = first.getMesh();
  bench.free(first);
  round(mesh.vertProperties);
  const rounded = bench.hold(new Manifold(mesh), 'tidy');
  const second = bench.hold(rounded.simplify(SIMPLIFY), 'tidy');
  bench.free(rounded);
  const shells = second.decompose();
  if (shells.length <= 1) {
    for (const s of shells) s.delete();
    return { solid: second, dropped: 0 };
  }
  const volumes = shells.map((s) => Math.abs(s.volume()));
  const largest = volumes.indexOf(Math.max(...volumes));
  shells.forEach((s, i) => {
    if (i !== largest) s.delete();
  });
  const kept = bench.hold(shells[largest]!, 'largest shell');
  const whole = volumes.reduce((a, b) => a + b, 0);
  bench.free(second);
  return { solid: kept, dropped: whole > 0 ? 1 - volumes[largest]! / whole : 0 };
}

export const isSpeck = (dropped: number): boolean => dropped <= SPECK;
