import { entry, num } from './entry.js';

/** Findings on the form, its equilibrium and its faces. */
export const TRUSS_FINDINGS = {
  'node-free': entry('warn', 'node', '', () => 'no strut ends here; remove the node or connect it'),
  'node-on-strut': entry(
    'warn',
    'node',
    'mm',
    (f) => `lies on ${f.about?.['strut']} without being its end; split the strut here or move the node`,
  ),
  'struts-cross': entry(
    'warn',
    'strut',
    'mm',
    (f) => `crosses ${f.about?.['other']} without a node, ${num(f.value)} mm apart; add a node or move one of them`,
  ),
  'node-out-of-balance': entry(
    'warn',
    'node',
    '',
    (f) =>
      `out of balance by ${num(f.value, 5)} of the largest force here (${num(f.about?.['residual_N'] as number)} N), limit ${num(f.limit, 5)}; the given forces are not those of this form`,
  ),
  'truss-out-of-balance': entry(
    'warn',
    'truss',
    '',
    (f) => `the loads and reactions miss balance by ${num(f.value, 5)} of all loads together, limit ${num(f.limit, 5)}`,
  ),
  'forces-missing': entry('note', 'truss', '', () => 'no member forces are given, so equilibrium was not checked'),
  'force-missing': entry('warn', 'strut', '', () => 'has no force while others have; equilibrium was not checked'),
  'supports-missing': entry(
    'note',
    'truss',
    '',
    () => 'has no supports: it was checked as a self-stressed figure and not analysed for loads',
  ),
  'face-not-flat': entry(
    'warn',
    'face',
    'mm',
    (f) =>
      `out of flat by ${num(f.value)} mm, limit ${num(f.limit)} mm; mend the form, split the face or bend the sheet`,
  ),
  'face-has-no-normal': entry(
    'stop',
    'face',
    '',
    () => 'its corners lie on one line, so it has no plane; give it corners that span an area or leave it out',
  ),
  'face-crosses-itself': entry('stop', 'face', '', () => 'its outline crosses itself; give its nodes in order'),
  'face-not-convex': entry('note', 'face', '', () => 'its outline has an inward corner'),
} as const;
