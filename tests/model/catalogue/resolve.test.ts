import { describe, expect, it } from 'vitest';
import { materialNamed } from '../../../src/model/catalogue/resolve.js';
import { type Job, jobSchema } from '../../../src/model/job/index.js';
import { isTested, isVerified, sourceOf } from '../../../src/model/material.js';

const jobWith = (materials: object): Job =>
  jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', materials });

describe('a material of the job', () => {
  it('like one of the catalogue keeps what it does not give, each value with its source', () => {
    const job = jobWith({ mine: { like: 'PETG-print', strength_MPa: { ftZ: 18 }, source: 'own test 7' } });
    const m = materialNamed(job, 'mine')!;
    expect(m.strength).toEqual({ ft: 47, ftZ: 18, fc: 47, fv: 23.5 });
    expect(sourceOf(m, 'ftZ')).toEqual({ text: 'own test 7', mark: 'user', verified: true });
    expect(sourceOf(m, 'ft').verified).toBe(false);
    expect(isTested(m)).toBe(true);
    expect(isVerified(m)).toBe(false);
  });

  it('that gives no strength is not tested, whatever its source says of the density', () => {
    const job = jobWith({ mine: { like: 'PETG-print', density_kg_per_m3: 1250, source: 'weighed' } });
    const m = materialNamed(job, 'mine')!;
    expect(m.density).toBe(1250);
    expect(isTested(m)).toBe(false);
  });

  it('without a source is the user’s and unverified', () => {
    const m = materialNamed(jobWith({ 'PLA-print': { strength_MPa: { ftZ: 20 } } }), 'PLA-print')!;
    expect(sourceOf(m, 'ftZ')).toMatchObject({ mark: 'user', verified: false });
    expect(isTested(m)).toBe(false);
  });

  it('of its own needs density and modulus, and may name its family', () => {
    expect(materialNamed(jobWith({ bamboo: { density_kg_per_m3: 700 } }), 'bamboo')).toBeNull();
    const own = { density_kg_per_m3: 700, modulus_MPa: 17000, modulus05_MPa: 12000, family: 'timber' };
    expect(materialNamed(jobWith({ bamboo: own }), 'bamboo')).toMatchObject({ family: 'timber', modulus05: 12000 });
  });
});
