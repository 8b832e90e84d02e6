import { expect, it } from 'vitest';
import { jobSchema } from '../../src/model/job/index.js';
import { assess } from '../../src/pipeline/assess.js';
import { trussOf } from '../helpers/truss.js';

/** An invented triangle of odd lengths. */
const truss = trussOf({
  nodes: [
    [0, 0, 0],
    [403.3, 0, 0],
    [200, 351.7, 0],
  ],
  edges: [
    [0, 1],
    [1, 2],
    [2, 0],
  ],
  forces: [-1, -1, -1],
});
const floatsOf = (joint: string): number[] => {
  const job = jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', nodes: { joint } });
  return assess(truss, job).parts.struts.flatMap((s) => s.ends.map((e) => e.float!));
};

it('seated struts reach their stops but for the saw’s step; glued ones keep their float', () => {
  for (const f of floatsOf('seated')) {
    expect(f).toBeGreaterThanOrEqual(0);
    expect(f).toBeLessThanOrEqual(0.25);
  }
  for (const f of floatsOf('glued')) expect(f).toBeGreaterThanOrEqual(0.75);
});

it('cut, setbacks and floats make the axis', () => {
  for (const joint of ['glued', 'seated']) {
    const job = jobSchema.parse({ format: 'strutwright-job/1', title: 'T', truss: 't.json', nodes: { joint } });
    for (const s of assess(truss, job).parts.struts) {
      const sum = s.cutLength! + s.ends.reduce((t, e) => t + e.setback! + e.float!, 0);
      expect(sum).toBeCloseTo(s.axisLength, 9);
    }
  }
});
