import { describe, expect, it } from 'vitest';
import { finding } from '../../src/model/findings/index.js';
import { isWithheld, settleFindings } from '../../src/model/hold.js';
import { defaultJob, type Job } from '../../src/model/job/index.js';

const job = (waivers: Job['waivers']): Job => ({ ...defaultJob(), waivers });
const thin = finding('wall-thin', 'A1', { value: 0.9, limit: 1.6, about: { where: 'S1' } });
const short = finding('strut-too-short', 'S1', { value: 40, limit: 50 });
const waive = (upTo?: number) => ({
  code: 'wall-thin',
  subject: 'A1',
  reason: 'tested',
  by: 'workshop',
  ...(upTo === undefined ? {} : { upTo }),
});

describe('waivers', () => {
  it('a stop on a part withholds its files and holds the pack', () => {
    const s = settleFindings([thin], job([]), []);
    expect(s.status).toBe('flagged');
    expect(s.hold).toHaveLength(1);
    expect(isWithheld('node', 'A1', s.findings)).toBe(true);
  });
  it('a waiver that covers the value clears it', () => {
    const s = settleFindings([thin], job([waive(0.8)]), []);
    expect([s.status, s.hold.length, s.waived.length]).toEqual(['clear', 0, 1]);
    expect(isWithheld('node', 'A1', s.findings)).toBe(false);
  });
  it('a worse value, or no upTo, voids the waiver', () => {
    for (const w of [waive(1.2), waive()]) {
      const s = settleFindings([thin], job([w]), []);
      expect(s.findings.map((f) => f.code)).toEqual(['wall-thin', 'waiver-void']);
      expect(s.hold).toHaveLength(1);
    }
  });
  it('an open mesh cannot be waived', () => {
    const open = finding('mesh-open', 'A1', { value: 4, limit: 0 });
    const s = settleFindings([open], job([{ code: 'mesh-open', subject: 'A1', upTo: 10, reason: 'x', by: 'y' }]), []);
    expect(s.hold).toHaveLength(1);
  });
  it('an idle waiver and a missing check are said; a strut too short withholds nothing', () => {
    const s = settleFindings([short], job([waive(1)]), ['equilibrium']);
    expect(s.findings.map((f) => f.code)).toEqual(['strut-too-short', 'check-missing', 'waiver-idle']);
    expect(isWithheld('strut', 'S1', s.findings)).toBe(false);
  });
});
