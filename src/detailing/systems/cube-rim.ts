import { dot } from '../../maths/vec3.js';
import type { Socket } from '../../model/parts.js';
import { type CubeFace, faceOf } from './cube-faces.js';
import { boreHalf, largest } from './sleeve.js';

/** How a bore enters the face of a cube. Lengths in mm, angles in rad. */
export interface CubeEntry {
  readonly face: CubeFace;
  /** Cosine of the axis to the face's normal. */
  readonly cosine: number;
  /** Of the axis out of the bore, from the face's normal. */
  readonly tilt: number;
  /** Where the axis leans to as it leaves: anticlockwise from the face's u, seen from outside; 0 where it is square. */
  readonly turn: number;
  /** Where the axis meets the face of a cube with half an edge of 1, along the face's u and v. */
  readonly at: readonly [number, number];
  /** Half the width of the rim on the face, along its u and v. */
  readonly rim: readonly [number, number];
}

type Bore = Pick<Socket, 'direction' | 'bore'>;

/** Round-off of a direction: less of a lean has no turn. */
const SQUARE = 1e-9;

/**
 * The rim of a round bore of radius r on the plane that its axis meets at a cosine m is the ellipse (I - d d') in that plane, whose half
 * width along a face's axis with the cosine d_j is r sqrt(1 + (d_j / m)²): the inverse of I - e e' is I + e e' / m², e in the plane.
 */
export function cubeEntry(bore: Bore): CubeEntry {
  const face = faceOf(bore.direction);
  const cosine = dot(bore.direction, face.normal);
  const at = [dot(bore.direction, face.u) / cosine, dot(bore.direction, face.v) / cosine] as const;
  const lean = Math.hypot(at[0], at[1]);
  const r = radiusOf(bore);
  return {
    face,
    cosine,
    tilt: Math.atan(lean),
    turn: lean > SQUARE ? Math.atan2(at[1], at[0]) : 0,
    at,
    rim: [r * Math.hypot(1, at[0]), r * Math.hypot(1, at[1])],
  };
}

/** Half the edge of the least cube on one face of which the whole rim lies, `web` from every edge, mm; infinity: none. */
export function halfForRim(bore: Bore, web: number): number {
  const { at, rim } = cubeEntry(bore);
  const along = (k: 0 | 1): number => {
    const left = 1 - Math.abs(at[k]);
    return left > SQUARE ? (rim[k] + web) / left : Number.POSITIVE_INFINITY;
  };
  return Math.max(along(0), along(1));
}

/** Depth that a tilted face takes from the rim's shallow side, r tan(tilt), mm. */
export const shallowSide = (bore: Bore): number => radiusOf(bore) * Math.tan(cubeEntry(bore).tilt);

const radiusOf = ({ bore }: Bore): number => largest(boreHalf({ bore } as Socket));
