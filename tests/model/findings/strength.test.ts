import { expect, it } from 'vitest';
import type { Finding } from '../../../src/model/finding.js';
import { sayFinding } from '../../../src/model/findings/index.js';

// A stop whose sentence reads "utilisation 1" contradicts the rule that 1 is just strong enough (EN 1990 6.4.2: Ed <= Rd).
it.each([
  [1.0004, '1.0004'],
  [1.004, '1.004'],
  [1.046, '1.05'],
  [12, '12'],
])('says a utilisation of %d as more than one', (value, said) => {
  const finding = {
    level: 'stop',
    code: 'socket-over-stressed',
    subject: 'B13',
    value,
    limit: 1,
    about: { strut: 'S52', force_N: -25, combination: 'given', rule: 'socket bond in shear' },
  } as unknown as Finding;
  expect(sayFinding(finding)).toContain(`a utilisation of ${said} under`);
});
