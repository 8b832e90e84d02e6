import { dot, subtract } from '../../maths/vec3.js';
import type { Material } from '../../model/material.js';
import type { Topology } from '../../model/topology.js';
import type { Face } from '../../model/truss.js';
import type { FaceForm } from '../faces.js';
import { faceLoop } from './face-loop.js';

/** Poisson's ratio where the material states none: of glassy plastics 0.35 to 0.4, of boards less; the stress changes by a tenth. */
const USUAL_POISSON = 0.37;
/** Weight that keeps curvatures as small as the corners allow where these do not decide them all. */
const LEAST_CURVATURE = 1e-6;

/**
 * Largest bending stress in MPa of a flat sheet bent cold onto the corners of a face: the least curved quadric through
 * them gives the principal curvatures, and σ = E t / (2 (1 - ν²)) · (κ1 + ν κ2) (thin plates: Timoshenko and
 * Woinowsky-Krieger, Theory of Plates and Shells, art. 10; from memory).
 */
export function bendStressOf(
  topology: Topology,
  face: Face,
  form: FaceForm,
  thickness: number,
  material: Material,
): number | null {
  if (!form.normal) return null;
  const loop = faceLoop(topology, face.nodes, form.origin, form.normal);
  const size = Math.max(...loop.corners.map((c) => Math.hypot(c[0], c[1])));
  if (!(size > 0)) return null;
  // Rows of z = a x² + b x y + c y² + d x + e y + f in units of the size.
  const rows = loop.points.map((p, i) => {
    const [x, y] = [loop.corners[i]![0] / size, loop.corners[i]![1] / size];
    return { row: [x * x, x * y, y * y, x, y, 1], z: dot(subtract(p, form.origin), form.normal!) / size };
  });
  const normal = Array.from({ length: 6 }, (_, i) =>
    Array.from(
      { length: 6 },
      (_, j) => rows.reduce((sum, r) => sum + r.row[i]! * r.row[j]!, 0) + (i === j ? LEAST_CURVATURE : 0),
    ),
  );
  const right = Array.from({ length: 6 }, (_, i) => rows.reduce((sum, r) => sum + r.row[i]! * r.z, 0));
  const found = solve(normal, right);
  if (!found) return null;
  const [a, b, c] = found as [number, number, number];
  // Second derivatives 2a, b, 2c; mm.
  const [mean, half] = [(a + c) / size, Math.hypot(a - c, b) / size];
  const [k1, k2] = [mean + half, mean - half];
  const nu = material.poisson ?? USUAL_POISSON;
  const plate = (material.modulus * thickness) / (2 * (1 - nu * nu));
  return plate * Math.max(Math.abs(k1 + nu * k2), Math.abs(k2 + nu * k1));
}

/** Gaussian elimination with partial pivoting; null where it is singular. */
function solve(matrix: number[][], right: number[]): number[] | null {
  const n = right.length;
  for (let k = 0; k < n; k++) {
    let pivot = k;
    for (let i = k + 1; i < n; i++) if (Math.abs(matrix[i]![k]!) > Math.abs(matrix[pivot]![k]!)) pivot = i;
    if (Math.abs(matrix[pivot]![k]!) < 1e-14) return null;
    [matrix[k], matrix[pivot]] = [matrix[pivot]!, matrix[k]!];
    [right[k], right[pivot]] = [right[pivot]!, right[k]!];
    for (let i = k + 1; i < n; i++) {
      const factor = matrix[i]![k]! / matrix[k]![k]!;
      for (let j = k; j < n; j++) matrix[i]![j]! -= factor * matrix[k]![j]!;
      right[i]! -= factor * right[k]!;
    }
  }
  const x = new Array<number>(n).fill(0);
  for (let i = n - 1; i >= 0; i--) {
    let sum = right[i]!;
    for (let j = i + 1; j < n; j++) sum -= matrix[i]![j]! * x[j]!;
    x[i] = sum / matrix[i]![i]!;
  }
  return x;
}
