import type { Sleeve } from '../detailing/systems/sleeve.js';
import type { Vec3 } from '../maths/vec3.js';
import type { Bench, Manifold } from './kernel.js';
import type { MeshBuilder } from './mesh-builder.js';

/** A solid drawn in a sleeve's own axes (y, z, along), put in the hub's. */
export const placedAlong = (bench: Bench, mesh: MeshBuilder, s: Sleeve, what: string): Manifold =>
  transformed(bench, mesh, s.socket.y, s.socket.z, s.socket.direction, [0, 0, 0], what);

/** A solid drawn in its own axes, put where they are in the hub. */
export function transformed(
  bench: Bench,
  mesh: MeshBuilder,
  x: Vec3,
  y: Vec3,
  z: Vec3,
  at: Vec3,
  what: string,
): Manifold {
  const { Manifold, Mesh } = bench.kernel;
  const local = bench.hold(new Manifold(new Mesh(mesh.mesh())), what);
  const solid = bench.hold(
    local.transform([x[0], x[1], x[2], 0, y[0], y[1], y[2], 0, z[0], z[1], z[2], 0, at[0], at[1], at[2], 1]),
    what,
  );
  bench.free(local);
  return solid;
}

/** Sides of a circle of a radius: enough for a chord error of 0.03 mm, in fours, 20 to 64. */
export function sidesFor(radius: number): number {
  const sides = Math.PI / Math.acos(1 - CHORD / Math.max(radius, 1));
  return Math.min(64, Math.max(20, 4 * Math.ceil(sides / 4)));
}

/** mm; a sixth of a layer. */
const CHORD = 0.03;
