import {
  difference,
  EndType,
  FillRule,
  inflatePaths,
  intersect,
  JoinType,
  type Path64,
  type Paths64,
  union,
} from 'clipper2-ts';
import { type Ring, signedArea } from './ring.js';

/** Units of the integer grid a millimetre: errors stay below 1e-5 mm and sheets of 100 m below 2^53. */
const GRID = 1e5;

const toGrid = (ring: Ring): Path64 => {
  const path: Path64 = [];
  for (let i = 0; i < ring.length; i += 2)
    path.push({ x: Math.round(ring[i]! * GRID), y: Math.round(ring[i + 1]! * GRID) } as Path64[number]);
  return path;
};

const fromGrid = (path: Path64): Ring => {
  const ring = new Float64Array(path.length * 2);
  path.forEach((p, i) => {
    ring[2 * i] = p.x / GRID;
    ring[2 * i + 1] = p.y / GRID;
  });
  return ring;
};

const backFromGrid = (paths: Paths64): Ring[] => paths.filter((p) => p.length >= 3).map(fromGrid);

/** The area covered by any of the anticlockwise rings; boundaries anticlockwise, their holes clockwise. */
export const unionOf = (rings: readonly Ring[]): Ring[] => backFromGrid(union(rings.map(toGrid), FillRule.NonZero));
/** The area of `subject` outside `clip`; boundaries anticlockwise, holes clockwise. */
export const differenceOf = (subject: readonly Ring[], clip: readonly Ring[]): Ring[] =>
  backFromGrid(difference(subject.map(toGrid), clip.map(toGrid), FillRule.NonZero));
/** The area in both; boundaries anticlockwise, holes clockwise. */
export const intersectionOf = (subject: readonly Ring[], clip: readonly Ring[]): Ring[] =>
  backFromGrid(intersect(subject.map(toGrid), clip.map(toGrid), FillRule.NonZero));

/** Largest distance of the chords of a rounded corner from the true arc, mm. */
const ARC_ERROR = 0.001;

/**
 * Boundaries moved outward (delta > 0) or inward by |delta| mm. `mitre` keeps corners sharp up to twice the
 * offset; `round` turns outer corners on arcs drawn inside the true ones by at most 0.001 mm.
 */
export function offsetRings(rings: readonly Ring[], delta: number, corner: 'mitre' | 'round'): Ring[] {
  const join = corner === 'round' ? JoinType.Round : JoinType.Miter;
  return backFromGrid(inflatePaths(rings.map(toGrid), delta * GRID, join, EndType.Polygon, 2, ARC_ERROR * GRID));
}

/** Total area of boundaries and holes. */
export const areaOf = (rings: readonly Ring[]): number => rings.reduce((sum, r) => sum + signedArea(r), 0);
