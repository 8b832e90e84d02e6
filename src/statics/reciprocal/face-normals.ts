import { fitPlane } from '../../maths/plane-fit.js';
import type { Vec3 } from '../../maths/vec3.js';
import type { Topology } from '../../model/topology.js';
import type { CellComplex } from './complex.js';

/** Normals of the faces of a complex, and how twisted the faces are. */
export interface FaceNormals {
  /** By face: unit normal by the right-hand rule along its loop. */
  readonly normals: readonly Vec3[];
  /** By face: its mean point, mm. */
  readonly middles: readonly Vec3[];
  /** By face: flatness over half its narrower width, a slope; Infinity where the corners lie on one line. */
  readonly twist: Float64Array;
}

/** Of every face that the complex uses, by total least squares; the others have no twist and a normal of no meaning. */
export function faceNormals(topology: Topology, complex: CellComplex): FaceNormals {
  const twist = new Float64Array(complex.faces.length);
  const normals: Vec3[] = complex.faces.map(() => [0, 0, 1]);
  const middles: Vec3[] = complex.faces.map(() => [0, 0, 0]);
  for (const f of complex.used) {
    const fit = fitPlane(Array.from(complex.faces[f], (i) => topology.truss.nodes[i].at));
    if (!fit) continue;
    normals[f] = fit.normal;
    middles[f] = fit.origin;
    twist[f] = fit.spread[1] > 0 ? fit.flatness / fit.spread[1] : Number.POSITIVE_INFINITY;
  }
  return { normals, middles, twist };
}
