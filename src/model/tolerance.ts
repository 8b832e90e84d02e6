/**
 * Every tolerance of the program, in two families.
 *
 * Round-off tolerances absorb floating-point error only. They scale with the size of the truss or of the numbers
 * compared, and no job can set them. Fit tolerances are the workshop's; a job may set them (section `fit`), and the
 * values here are their defaults.
 */
export interface Tolerance {
  readonly value: number;
  /** "1": relative. */
  readonly unit: string;
  readonly reason: string;
  readonly source: string;
}

export const ROUND_OFF = {
  coincident: {
    value: 1e-9,
    unit: '1',
    reason: 'two nodes closer than this share of the truss size are one point: below any coordinate a file carries',
    source: 'double precision carries 1e-16; coordinates exported with 9 digits',
  },
  crossing: {
    value: 1e-7,
    unit: '1',
    reason: 'two struts nearer than this share of the truss size cross',
    source: 'rounding of exported coordinates',
  },
  forceScale: {
    value: 1e-9,
    unit: '1',
    reason: 'a member force below this share of the largest in the truss is nought: nothing is held against it',
    source: 'sums of doubles; forces exported with 9 digits',
  },
  lengthSum: {
    value: 1e-9,
    unit: '1',
    reason: 'cut + setbacks + floats against the axis length',
    source: 'a sum of five doubles',
  },
  sawStep: {
    value: 1e-6,
    unit: 'mm',
    reason: 'slack before rounding to whole steps, so that a binary fraction does not cost a step',
    source: 'a sum of doubles of some metres errs below 1e-11 mm',
  },
} as const satisfies Record<string, Tolerance>;

export const FIT = {
  residualWarn: {
    value: 1e-3,
    unit: '1',
    reason: 'residual at a node over the largest member force there: what rounding forces to three digits leaves',
    source: 'common practice, no source',
  },
  residualStop: {
    value: 1e-2,
    unit: '1',
    reason: 'a residual of one part in a hundred means that the forces are not those of this form',
    source: 'common practice, no source',
  },
  flatnessWarn: {
    value: 0.5,
    unit: 'mm',
    reason: 'a sheet out of flat by more than this shows in its reflections and strains its fixings',
    source: 'common practice, no source',
  },
  sawStep: {
    value: 0.5,
    unit: 'mm',
    reason: 'what a stop is set to by hand',
    source: 'common practice, no source',
  },
  endFloat: {
    value: 0.75,
    unit: 'mm',
    reason: 'play at each strut end, so that a long strut never holds the frame open',
    source: 'common practice, no source (0.5 to 1.0)',
  },
} as const satisfies Record<string, Tolerance>;
