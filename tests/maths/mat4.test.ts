import { expect, it } from 'vitest';
import { frameToWorld, invertRigid, multiply4, transformPoint } from '../../src/maths/mat4.js';
import { cross, normalise, perpendicular, type Vec3 } from '../../src/maths/vec3.js';

it('a rigid motion and its inverse cancel', () => {
  const x = normalise([1, 2, -0.5]);
  const y = cross(perpendicular(x), x);
  const m = frameToWorld([10, -3, 7], x, y);
  const p: Vec3 = [1.5, -2, 40];
  const back = transformPoint(multiply4(invertRigid(m), m), p);
  back.forEach((v, i) => {
    expect(v).toBeCloseTo(p[i]!, 12);
  });
});
