import { entry, num } from './entry.js';

/** Findings on strength: members, sockets, panels, and what the use of the thing asks of its materials. */
export const STRENGTH_FINDINGS = {
  'member-over-stressed': entry(
    'stop',
    'strut',
    '',
    (f) =>
      `utilisation ${over(f.value)} under ${num(f.about?.['force_N'] as number, 0)} N (${f.about?.['combination']}), by ${f.about?.['rule']}; choose a stronger section than ${f.about?.['section']} or a shorter strut`,
  ),
  'socket-over-stressed': entry(
    'stop',
    'node',
    '',
    (f) =>
      `the socket of ${f.about?.['strut']} has a utilisation of ${over(f.value)} under ${num(f.about?.['force_N'] as number, 0)} N (${f.about?.['combination']}), by ${f.about?.['rule']}${f.about?.['depth_mm'] === undefined ? '; make the walls thicker or the force smaller' : `; it needs a depth of ${num(f.about['depth_mm'] as number, 1)} mm`}`,
    { withholds: true },
  ),
  'socket-no-path': entry(
    'stop',
    'node',
    'N',
    (f) =>
      `the socket of ${f.about?.['strut']} is ${f.about?.['joint']} and holds no ${f.about?.['sign']}, but the strut carries ${num(f.value, 1)} N (${f.about?.['combination']}): ${f.about?.['why']}`,
    { withholds: true },
  ),
  'sockets-deepened': entry(
    'note',
    'truss',
    '',
    (f) =>
      `${num(f.value, 0)} sockets are deeper than ${num(f.about?.['factor'] as number, 2)} strut sizes because their bond has to carry more; the deepest, of ${f.about?.['end']}, is ${num(f.about?.['depth_mm'] as number, 1)} mm`,
  ),
  'panel-over-stressed': entry(
    'stop',
    'panel',
    '',
    (f) =>
      `utilisation ${over(f.value)} under ${f.about?.['combination']}, by ${f.about?.['rule']}; use a thicker sheet than ${num(f.about?.['thickness'] as number, 1)} mm or hold it at more points`,
    { withholds: true },
  ),
  'panel-sags': entry(
    'stop',
    'panel',
    'mm',
    (f) =>
      `bows by ${num(f.value, 1)} mm under ${f.about?.['combination']}, more than the ${num(f.limit, 1)} mm at which it slips out of its ${f.about?.['holdBy']}; use a thicker sheet or a deeper bite`,
    { withholds: true },
  ),
  'panel-not-carried': entry(
    'stop',
    'panel',
    'N',
    (f) =>
      `nothing carries ${num(f.value, 1)} N of ${f.about?.['sense']} on it (${f.about?.['combination']}): held by ${f.about?.['holdBy']}; hold it at three points out of line at least`,
  ),
  'fixing-over-loaded': entry(
    'stop',
    'panel',
    'N',
    (f) =>
      `one of its ${f.about?.['holdBy']} carries ${num(f.value, 1)} N under ${f.about?.['combination']}, more than ${num(f.limit, 1)} N; use more of them`,
  ),
  'fixing-untested': entry(
    'warn',
    'panel',
    'N',
    (f) =>
      `one of its ${f.about?.['holdBy']} must hold ${num(f.value, 1)} N (${f.about?.['combination']}); test one and give panels.fixingCapacity_N`,
  ),
  'strength-out-of-scope': entry(
    'warn',
    'strut',
    '',
    (f) => `was not judged by ${f.about?.['standard']}: ${f.about?.['reason']}`,
  ),
  'material-value-missing': entry(
    'warn',
    'truss',
    '',
    (f) =>
      `${f.about?.['struts']} struts of ${f.about?.['material']} were not judged by ${f.about?.['standard']}: it needs ${f.about?.['values']}; give them under "materials"`,
  ),
  'section-material-unknown': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `${num(f.value, 0)} struts of section ${f.about?.['section']} have no material: "${f.about?.['material']}" is in neither the catalogue nor the job, or lacks density or modulus; add it under "materials"`,
  ),
  'values-unverified': entry(
    'note',
    'truss',
    '',
    (f) =>
      `its strength rests on unverified values of ${f.about?.['materials']}; test a joint and enter your own values`,
  ),
  'connectors-untested': entry(
    'stop',
    'truss',
    '',
    (f) =>
      `${f.about?.['use']} use asks for a test value of your own for the printed connectors of ${f.about?.['material']}; test a joint and give strength_MPa with its source under "materials"`,
  ),
  'softening-low': entry(
    'stop',
    'truss',
    '°C',
    (f) =>
      `${f.about?.['material']} softens at ${num(f.value, 0)} °C, less than the ${num(f.limit, 0)} °C that sun on a dark part asks for; choose another plastic`,
  ),
  'softening-unknown': entry(
    'stop',
    'truss',
    '°C',
    (f) => `the softening point of ${f.about?.['material']} is not known; give softening_C under "materials"`,
  ),
  'service-class-missing': entry(
    'stop',
    'truss',
    '',
    () =>
      'stands outdoors and its timber has no service class; give strength.serviceClass (3 for weather, 2 under a roof)',
  ),
} as const;

/** A utilisation above one, with as many decimals as it takes to be read as above one. */
function over(value: number | null): string {
  for (let decimals = 2; decimals < 6; decimals++) {
    if (value !== null && Number(value.toFixed(decimals)) > 1) return num(value, decimals);
  }
  return num(value, 6);
}
