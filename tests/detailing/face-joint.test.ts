import fc from 'fast-check';
import { expect, it } from 'vitest';
import { faceJointEnd } from '../../src/detailing/face-joint.js';
import { add, cross, dot, normalise, perpendicular, scale, subtract, type Vec3 } from '../../src/maths/vec3.js';

const deg = (rad: number): number => (rad * 180) / Math.PI;

it('mitres a flat frame: half the corner each, no bevel, the long point half the width out', () => {
  const end = faceJointEnd([1, 0, 0], [0, 1, 0], [0, 0, 1], 40, 20, [[0, 1, 0]]);
  expect(end.cuts).toHaveLength(1);
  expect(deg(end.cuts[0]!.mitre)).toBeCloseTo(45, 10);
  expect(end.cuts[0]!.bevel).toBeCloseTo(0, 12);
  expect(end.longPoint).toBeCloseTo(-20, 10);
});

// Settings for crown moulding at a square corner, lying flat on the saw, as printed in mitre-saw manuals (from memory):
// 45 degree spring 35.3 and 30.0, 38 degree spring (52/38) 31.6 and 33.9.
it.each([
  [45, 35.26, 30.0],
  [52, 31.62, 33.86],
])('gives the compound angles of a moulding turned %d degrees at a square corner', (turn, mitre, bevel) => {
  const [c, s] = [Math.cos((turn * Math.PI) / 180), Math.sin((turn * Math.PI) / 180)];
  const end = faceJointEnd([1, 0, 0], [0, c, s], [0, -s, c], 90, 15, [[0, 1, 0]]);
  expect(Math.abs(deg(end.cuts[0]!.mitre))).toBeCloseTo(mitre, 2);
  expect(Math.abs(deg(end.cuts[0]!.bevel))).toBeCloseTo(bevel, 2);
});

it('needs no cut but a square one between two struts in line, and none against its own direction', () => {
  const [cut, ...more] = faceJointEnd([1, 0, 0], [0, 1, 0], [0, 0, 1], 40, 20, [[-1, 0, 0]]).cuts;
  expect(more).toEqual([]);
  expect(cut!.mitre).toBeCloseTo(0, 12);
  expect(cut!.bevel).toBeCloseTo(0, 12);
  const same = faceJointEnd([1, 0, 0], [0, 1, 0], [0, 0, 1], 40, 20, [[1, 0, 0]]);
  expect(same).toEqual({ cuts: [], longPoint: 0 });
});

const unit = fc
  .tuple(fc.double({ min: -1, max: 1, noNaN: true }), fc.double({ min: 0, max: 2 * Math.PI, noNaN: true }))
  .map(([z, a]): Vec3 => {
    const r = Math.sqrt(1 - z * z);
    return [r * Math.cos(a), r * Math.sin(a), z];
  });

it('agrees with points tried all over the section, however it is turned in space', () => {
  fc.assert(
    fc.property(unit, fc.array(unit, { minLength: 1, maxLength: 5 }), (direction, others) => {
      fc.pre(others.every((o) => dot(direction, o) < 0.9));
      const y = perpendicular(direction);
      const z = cross(direction, y);
      const [width, height] = [30, 18];
      const end = faceJointEnd(direction, y, z, width, height, others);
      let lowest = Infinity;
      const seen = new Set<number>();
      for (let i = 0; i <= 40; i++) {
        for (let j = 0; j <= 40; j++) {
          const p = add(scale(y, (i / 40 - 0.5) * width), scale(z, (j / 40 - 0.5) * height));
          // Along the axis until the point is nearer to this strut's axis than to any other's, in angle.
          const starts = others.map((o) => -dot(p, subtract(direction, o)) / (1 - dot(direction, o)));
          const start = Math.max(...starts);
          if (starts.filter((x) => x > start - 1e-6).length === 1) seen.add(starts.indexOf(start));
          lowest = Math.min(lowest, start);
        }
      }
      expect(end.longPoint).toBeLessThanOrEqual(lowest + 1e-9);
      expect(end.longPoint).toBeGreaterThan(lowest - 3);
      // A face that points were found on is a cut; a sliver between the points may be one too.
      for (const against of seen) expect(end.cuts.some((c) => c.against === against)).toBe(true);
      for (const c of end.cuts) {
        // The blade's plane, put together from the two angles, is the plane midway to the neighbour.
        const out = add(
          add(
            scale(direction, -Math.cos(c.bevel) * Math.cos(c.mitre)),
            scale(y, Math.cos(c.bevel) * Math.sin(c.mitre)),
          ),
          scale(z, Math.sin(c.bevel)),
        );
        const plane = normalise(subtract(others[c.against]!, direction));
        expect(dot(out, plane)).toBeCloseTo(1, 9);
      }
    }),
    { numRuns: 200, seed: 11 },
  );
});
