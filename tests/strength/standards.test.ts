import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { MATERIALS } from '../../src/model/catalogue/materials/index.js';
import { SECTIONS } from '../../src/model/catalogue/sections/index.js';
import { defaultJob } from '../../src/model/job/index.js';
import type { MemberActions } from '../../src/model/solution.js';
import { standardFor } from '../../src/strength/choose.js';
import type { MemberToJudge } from '../../src/strength/standard.js';

const sections = [...SECTIONS.values()];
const force = fc.double({ min: -1e5, max: 1e5, noNaN: true });
const moment = fc.double({ min: 0, max: 1e7, noNaN: true });
const actions: fc.Arbitrary<MemberActions> = fc.record({
  combination: fc.constant('given'),
  axial: force,
  shearY: force,
  shearZ: force,
  momentY: moment,
  momentZ: moment,
  torsion: force,
  duration: fc.constantFrom('permanent', 'long', 'medium', 'short', 'instantaneous'),
});
const member: fc.Arbitrary<MemberToJudge> = fc
  .tuple(fc.constantFrom(...sections), fc.double({ min: 10, max: 6000, noNaN: true }))
  .map(([s, bucklingLength]) => ({ shape: s.shape, material: MATERIALS.get(s.material)!, bucklingLength }));
const rules = { serviceClass: 2, factor: 3 } as const;
const job = defaultJob();

const times = (a: MemberActions, k: number): MemberActions => ({
  ...a,
  axial: k * a.axial,
  shearY: k * a.shearY,
  shearZ: k * a.shearZ,
  momentY: k * a.momentY,
  momentZ: k * a.momentZ,
  torsion: k * a.torsion,
});

describe('every section of the catalogue under any actions', () => {
  it('has all the values that its standard needs', () => {
    for (const s of sections) {
      const material = MATERIALS.get(s.material)!;
      const standard = standardFor(job, material);
      expect(standard.missing(material), s.name).toEqual([]);
      expect(standard.outOfScope({ shape: s.shape, material, bucklingLength: 100 }), s.name).toBeNull();
    }
  });

  it('has a finite utilisation, not negative, with a rule', () => {
    fc.assert(
      fc.property(member, actions, (m, a) => {
        const { utilisation, rule } = standardFor(job, m.material).judge(m, a, rules);
        expect(Number.isFinite(utilisation)).toBe(true);
        expect(utilisation).toBeGreaterThanOrEqual(0);
        expect(rule.length).toBeGreaterThan(3);
      }),
      { seed: 1, numRuns: 2000 },
    );
  });

  it('is used more by twice the actions, and fails by a thousand times what just passes', () => {
    fc.assert(
      fc.property(member, actions, (m, a) => {
        const standard = standardFor(job, m.material);
        const one = standard.judge(m, a, rules).utilisation;
        const two = standard.judge(m, times(a, 2), rules).utilisation;
        if (one > 1e-9 && one <= 1) expect(two).toBeGreaterThan(one);
        if (one > 1) expect(two).toBeGreaterThan(1);
      }),
      { seed: 2, numRuns: 2000 },
    );
  });

  it('does not care which way it is turned: width and height, y and z exchanged', () => {
    fc.assert(
      fc.property(member, actions, (m, a) => {
        const { shape } = m;
        const turned =
          shape.kind === 'rectangle' ? { kind: shape.kind, width: shape.height, height: shape.width } : shape;
        const other = { ...a, momentY: a.momentZ, momentZ: a.momentY, shearY: a.shearZ, shearZ: a.shearY };
        const standard = standardFor(job, m.material);
        const one = standard.judge(m, a, rules).utilisation;
        const two = standard.judge({ ...m, shape: turned }, other, rules).utilisation;
        expect(Math.abs(two - one)).toBeLessThanOrEqual(1e-9 * Math.max(1, one));
      }),
      { seed: 3, numRuns: 1000 },
    );
  });

  it('a longer strut in compression is used no less', () => {
    fc.assert(
      fc.property(member, fc.double({ min: 1, max: 1e4, noNaN: true }), (m, n) => {
        const standard = standardFor(job, m.material);
        const pressed = { ...times(NONE, 1), axial: -n };
        const short = standard.judge(m, pressed, rules).utilisation;
        const long = standard.judge({ ...m, bucklingLength: 1.5 * m.bucklingLength }, pressed, rules).utilisation;
        expect(long).toBeGreaterThanOrEqual(short * (1 - 1e-12));
      }),
      { seed: 4, numRuns: 1000 },
    );
  });
});

const NONE: MemberActions = {
  combination: 'given',
  axial: 0,
  shearY: 0,
  shearZ: 0,
  momentY: 0,
  momentZ: 0,
  torsion: 0,
  duration: 'short',
};
