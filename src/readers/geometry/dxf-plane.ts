import { add, cross, normalise, scale, type Vec3 } from '../../maths/vec3.js';
import { type DxfThing, numberOf } from './dxf-groups.js';

/** Below this share of 1, |Nx| and |Ny| put the extrusion near world z (AutoCAD DXF reference, Arbitrary axis algorithm). */
const NEAR_Z = 1 / 64;

/** From an entity's own plane to the axes around it, by its extrusion direction (210, 220, 230) and the arbitrary axis algorithm. */
export function planeOf(thing: DxfThing): (p: Vec3) => Vec3 {
  const z = normalise([numberOf(thing, 210), numberOf(thing, 220), numberOf(thing, 230, 1)]);
  if (z[0] === 0 && z[1] === 0 && z[2] >= 0) return (p) => p;
  const x = normalise(Math.abs(z[0]) < NEAR_Z && Math.abs(z[1]) < NEAR_Z ? cross([0, 1, 0], z) : cross([0, 0, 1], z));
  const y = normalise(cross(z, x));
  return (p) => add(add(scale(x, p[0]), scale(y, p[1])), scale(z, p[2]));
}
