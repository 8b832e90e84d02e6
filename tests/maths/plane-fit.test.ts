import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import { expect, it } from 'vitest';
import { areaVector, fitPlane } from '../../src/maths/plane-fit.js';
import { seededRandom } from '../../src/maths/random.js';
import { dot, mean, subtract, type Vec3 } from '../../src/maths/vec3.js';

it('the fitted normal is the last right singular vector of the centred points (ml-matrix)', () => {
  const random = seededRandom(11);
  for (let round = 0; round < 50; round++) {
    const points = Array.from({ length: 3 + (round % 5) }, (): Vec3 => [random() * 9, random() * 5, random() * 2 + 40]);
    const centred = new Matrix(points.map((p) => [...subtract(p, mean(points))]));
    const svd = new SingularValueDecomposition(
      centred.mmul(centred.transpose()).rows > 3 ? centred : centred.transpose().mmul(centred),
    );
    const v = svd.rightSingularVectors;
    const fit = fitPlane(points)!;
    expect(Math.abs(dot(fit.normal, [v.get(0, 2), v.get(1, 2), v.get(2, 2)]))).toBeCloseTo(1, 10);
  }
});

it('the normal follows the loop by the right-hand rule, and the area vector has the area', () => {
  const square: Vec3[] = [
    [0, 0, 5],
    [2, 0, 5],
    [2, 3, 5],
    [0, 3, 5],
  ];
  expect(fitPlane(square)!.normal[2]).toBeCloseTo(1, 14);
  expect(fitPlane([...square].reverse())!.normal[2]).toBeCloseTo(-1, 14);
  expect(areaVector(square)).toEqual([0, 0, 6]);
  expect(fitPlane(square.slice(0, 2))).toBeNull();
});
