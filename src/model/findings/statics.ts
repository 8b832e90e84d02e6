import { entry, num } from './entry.js';

/** Findings on stability, loads and supports. */
export const STATICS_FINDINGS = {
  'truss-mechanism': entry(
    'stop',
    'truss',
    '',
    (f) => `can move as pinned: ${f.about?.['words']}; add a strut or a support, or make the joints rigid`,
    { waivable: false },
  ),
  'mechanism-held': entry(
    'note',
    'truss',
    '',
    (f) => `would move if its joints were pins (${f.about?.['words']}); ${f.about?.['by']} (${num(f.value, 3)})`,
  ),
  'near-mechanism': entry(
    'warn',
    'truss',
    '',
    (f) =>
      `is almost a mechanism (singular value ${num(f.value, 7)}, sound trusses lie above ${num(f.limit, 3)}): ${f.about?.['words']}; small errors in length move it far`,
  ),
  'truss-unsupported': entry(
    'stop',
    'truss',
    '',
    (f) => `its supports leave it free to move as a whole: ${f.about?.['words']}; hold more directions`,
    { waivable: false },
  ),
  'piece-unsupported': entry(
    'stop',
    'node',
    '',
    (f) => `belongs to a piece of ${num(f.value, 0)} nodes that the supports do not hold; connect or support it`,
    { waivable: false },
  ),
  'buckling-low': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `buckles at ${num(f.value, 2)} times ${f.about?.['combination']} with design stiffness, less than ${num(f.limit, 0)} (${f.about?.['first']}); use stiffer struts or shorter ones`,
    { waivable: false },
  ),
  'second-order': entry(
    'warn',
    'truss',
    '',
    (f) =>
      `buckles at ${num(f.value, 2)} times ${f.about?.['combination']} with design stiffness, less than ${num(f.limit, 0)} (${f.about?.['first']}): second-order effects are not small (EN 1993-1-1 5.2.1)${f.about?.['made'] === 'yes' ? '; they were analysed with imperfections and stand in the combinations' : '; ask for analysis.secondOrder'}`,
  ),
  'buckling-unsettled': entry(
    'warn',
    'truss',
    '',
    (f) => `the count of negative pivots disagrees with the load factors found for ${f.about?.['combination']}`,
  ),
  'stiffness-missing': entry(
    'warn',
    'strut',
    '',
    () => 'has neither section and material nor area and modulus, so the truss was not analysed; give it a section',
  ),
  'solve-inexact': entry(
    'warn',
    'truss',
    '',
    (f) => `its equations were solved with a residual of ${num(f.value, 12)} only; stiffnesses differ too widely`,
  ),
  'load-on-unknown': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `the case "${f.about?.['case']}" names "${f.about?.['mark']}", which the truss does not have; correct the mark`,
  ),
  'load-on-free-node': entry(
    'stop',
    'node',
    'N',
    (f) =>
      `carries ${num(f.value)} N in the case "${f.about?.['case']}" and no strut ends here; connect it or move the load`,
  ),
  'pressure-without-panels': entry(
    'warn',
    'truss',
    '',
    (f) => `the pressure of "${f.about?.['case']}" meets no panel; name groups of faces that have panels`,
  ),
  'expansion-unknown': entry(
    'warn',
    'truss',
    '',
    (f) => `the expansion of ${f.about?.['material']} is not known, so "${f.about?.['case']}" does not lengthen it`,
  ),
  'combination-unknown-case': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `the combination "${f.about?.['combination']}" names the case "${f.about?.['case']}", which does not exist; correct the name or add it under loads.cases`,
  ),
  'load-missing': entry(
    'stop',
    'truss',
    '',
    (f) => `stands outdoors and has no ${f.about?.['kind']} case; give one under "loads", or say "indoors": true`,
  ),
  'anchorage-missing': entry(
    'stop',
    'truss',
    '',
    () => 'stands outdoors and nothing is said of what holds its supports down; give loads.anchorage',
  ),
  'support-uplift': entry(
    'stop',
    'support',
    'N',
    (f) =>
      `is lifted by ${num(f.value, 1)} N (${f.about?.['combination']}), more than the ${num(f.limit, 1)} N that holds it; anchor it or add ${num(f.about?.['ballast_kg'] as number, 1)} kg`,
  ),
  'support-anchor': entry(
    'note',
    'support',
    'N',
    (f) =>
      `needs an anchor for ${num(f.value, 1)} N of uplift with ${num(f.about?.['shear_N'] as number, 1)} N of shear, or ${num(f.about?.['ballast_kg'] as number, 1)} kg of ballast (${f.about?.['combination']})`,
  ),
  'truss-overturns': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `tips over ${f.about?.['edge']} under ${f.about?.['combination']}: ${f.value === null ? 'nothing holds it down' : `overturning is ${num(f.value, 2)} times what its loads hold down`}; widen the base or anchor it`,
  ),
  'forces-not-elastic': entry(
    'note',
    'truss',
    'N',
    (f) =>
      `given and analysed forces differ by up to ${num(f.value, 2)} N (${f.about?.['strut']}): ${f.about?.['why']}; strength takes the worse of both`,
  ),
} as const;
