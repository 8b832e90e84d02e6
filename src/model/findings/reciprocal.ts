import { entry, num } from './entry.js';

/** Findings of the reciprocal stage. */
export const RECIPROCAL_FINDINGS = {
  'face-in-no-cell': entry('warn', 'face', '', () => 'belongs to no cell and takes no part in the force diagram'),
  'face-in-one-cell': entry(
    'stop',
    'face',
    '',
    (f) => `lies on one side only, of ${f.about?.['cells']}; name it in the cell behind it, or in "outside"`,
  ),
  'face-in-three-cells': entry(
    'stop',
    'face',
    '',
    (f) => `lies in ${num(f.value)} cells (${f.about?.['cells']}); a face has two sides`,
  ),
  'face-twice-in-cell': entry('stop', 'face', '', (f) => `is named twice in ${f.about?.['cells']}`),
  'face-too-twisted': entry('stop', 'face', '', (f) =>
    f.value === null
      ? 'its corners lie on one line, so it has no normal and no part of a diagram'
      : `is twisted by ${num(f.value, 5)} of its own width, limit ${num(f.limit, 5)}: not flat enough to have a normal; mend the form`,
  ),
  'faces-overlap': entry(
    'stop',
    'face',
    '',
    () => 'lies on another face along one of its edges, so cells cannot be found; give "cells"',
  ),
  'cell-open': entry(
    'stop',
    'cell',
    '',
    (f) => `is open along ${f.about?.['along']}; add the face that is missing there`,
  ),
  'cell-empty': entry('stop', 'cell', '', () => 'has no faces'),
  'cell-pinched': entry(
    'stop',
    'cell',
    '',
    (f) => `has more than two faces along ${f.about?.['along']}; split it in two cells`,
  ),
  'cell-in-pieces': entry(
    'stop',
    'cell',
    '',
    (f) => `falls into ${num(f.value)} closed pieces; join them or make each a cell`,
  ),
  'cells-not-orientable': entry(
    'stop',
    'cell',
    '',
    () => 'cannot be given an inside and an outside together with its neighbours; check the faces it names',
  ),
  'cells-not-found': entry('stop', 'truss', '', (f) =>
    f.value === 0
      ? 'its faces enclose nothing, so there are no cells'
      : `cells could not be found from the faces: they fall into ${num(f.value)} separate bodies or overlap; give "cells"`,
  ),
  'strut-not-surrounded': entry(
    'stop',
    'strut',
    '',
    () => 'the cells round it do not form one ring; two bodies touch along it or a cell is missing',
  ),
  'euler-not-zero': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `the cells do not fill space: nodes ${f.about?.['V']} − edges ${f.about?.['E']} + faces ${f.about?.['F']} − cells ${f.about?.['C']} = ${num(f.value)}, not 0`,
  ),
  'strut-outside-cells': entry(
    'warn',
    'strut',
    '',
    () => 'is an edge of no cell, so a force diagram gives it no force; add the faces along it',
  ),
  'edge-without-strut': entry(
    'warn',
    'face',
    'N',
    (f) => `its edge ${f.about?.['edge']} has no strut, but the diagram puts ${num(f.value)} N there; add the strut`,
  ),
  'vertex-missing': entry('stop', 'cell', '', () => 'has no vertex in the force diagram'),
  'vertex-of-no-cell': entry('stop', 'cell', '', () => 'has a vertex in the force diagram but is not a cell'),
  'vertex-twice': entry('stop', 'cell', '', () => 'has more than one vertex in the force diagram'),
  'polygon-not-square': entry(
    'warn',
    'strut',
    'deg',
    (f) => `its force polygon is ${num(f.value)}° out of square to it, limit ${num(f.limit)}°; mend the form`,
  ),
  'diagram-of-another-form': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `the force diagram is of another form: ${num(f.value)} of its polygons in a hundred are not square to their struts`,
  ),
  'reciprocal-unsigned': entry(
    'stop',
    'truss',
    '',
    () => 'nothing says which struts the diagram puts in tension; set "forces.sign" in the job or give forces',
  ),
  'reciprocal-unscaled': entry(
    'stop',
    'truss',
    '',
    () => 'nothing scales the diagram that was found; set "forces.largest_N" in the job, or give forces or loads',
  ),
  'no-reciprocal': entry(
    'warn',
    'truss',
    '',
    (f) => `has no force diagram (dimension 0): ${f.about?.['reason']}; forces must come from elsewhere`,
  ),
  'reciprocal-undecided': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `has a family of ${num(f.value)} independent diagrams and nothing picks one; fix forces of some struts in "forces.fix" or give forces`,
  ),
  'fixed-force-unknown': entry(
    'stop',
    'strut',
    '',
    () => 'has its force fixed in "forces.fix" but is no strut of the truss; correct the mark',
  ),
  'reciprocal-misses-forces': entry(
    'warn',
    'truss',
    '',
    (f) =>
      `the nearest diagram misses the wanted forces by ${num(f.value, 5)} of the largest, limit ${num(f.limit, 5)}`,
  ),
  'reciprocal-misses-loads': entry(
    'warn',
    'truss',
    '',
    (f) =>
      `no diagram of these cells carries the loads: the nearest misses by ${num(f.value, 5)} of the largest load; forces must come from elsewhere`,
  ),
  'pattern-not-kept': entry(
    'warn',
    'strut',
    'N',
    (f) => `carries ${num(f.value)} N, not the ${f.about?.['wanted']} wanted in group ${f.about?.['group']}`,
  ),
  'forces-differ': entry(
    'warn',
    'truss',
    '',
    (f) =>
      `${f.about?.['first']} and ${f.about?.['second']} forces differ by ${num(f.value, 5)} of the largest, limit ${num(f.limit, 5)} (most in ${f.about?.['strut']}, ${num(f.about?.['difference_N'] as number)} N; ${num(f.about?.['remainder_N'] as number)} N of it is no self-stress)`,
  ),
  'radials-not-concurrent': entry(
    'warn',
    'strut',
    'mm',
    (f) =>
      `misses the point where ${f.about?.['others']} meet by ${num(f.value)} mm, limit ${num(f.limit)} mm: three struts between two rings must meet in one point`,
  ),
  'regions-not-found': entry(
    'warn',
    'truss',
    '',
    (f) => `is plane but its regions cannot be told apart: ${f.about?.['reason']}`,
  ),
  'lifting-count-differs': entry(
    'warn',
    'truss',
    '',
    (f) => `has ${num(f.value)} independent liftings against ${num(f.limit)} states of self-stress; check its regions`,
  ),
  'mend-not-within-bound': entry(
    'stop',
    'truss',
    'mm',
    (f) =>
      `mending would move ${f.about?.['node']} by ${num(f.value, 4)} mm, more than the ${num(f.limit, 6)} mm allowed`,
  ),
  'mend-changes-forces': entry(
    'stop',
    'truss',
    '',
    (f) => `mending would change a force by ${num(f.value, 5)} of the largest, more than ${num(f.limit, 5)}`,
  ),
  'mend-not-reached': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `could not be mended: ${f.about?.['what']} stays at ${num(f.value, 12)} of the mean strut or the largest force, wanted ${num(f.limit, 12)}`,
  ),
} as const;
