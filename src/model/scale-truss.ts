import { scale, type Vec3 } from '../maths/vec3.js';
import type { Truss } from './truss.js';

/**
 * The truss with every length times `factors.scale` and every force times `factors.forceScale`, both positive.
 * Force faces grow with the square of the scale, so newtonPerArea takes forceScale / scale²; areas and moduli that
 * override a section's are of the real strut and stay.
 */
export function scaleTruss(truss: Truss, factors: { readonly scale: number; readonly forceScale: number }): Truss {
  const { scale: s, forceScale: f } = factors;
  if (s === 1 && f === 1) return truss;
  const move = <T extends { readonly at: Vec3 }>(item: T): T => ({ ...item, at: scale(item.at, s) });
  return {
    ...truss,
    nodes: truss.nodes.map(move),
    members: truss.members.map((m) => (m.force === null ? m : { ...m, force: m.force * f })),
    loads: truss.loads.map((load) => ({ ...load, force: scale(load.force, f) })),
    reciprocal: truss.reciprocal && {
      newtonPerArea: (truss.reciprocal.newtonPerArea * f) / s ** 2,
      vertices: truss.reciprocal.vertices.map(move),
    },
  };
}
