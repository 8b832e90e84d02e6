import type { Job } from '../../model/job/index.js';
import { FORCE_IN_N, KG_IN_LB, LENGTH_IN_MM } from '../../model/units.js';

/** Numbers for people, in the job's units of output. Unknown is blank. Everything inside stays mm, N, kg, MPa, rad. */
export interface Units {
  readonly lengthUnit: 'mm' | 'in';
  readonly forceUnit: 'N' | 'kN' | 'lbf' | 'kip';
  readonly massUnit: 'kg' | 'lb';
  readonly areaUnit: 'mm²' | 'in²';
  readonly volumeUnit: 'cm³' | 'in³';
  /** For the strip along the foot. */
  readonly words: string;
  length(mm: number | null, decimals?: number): string;
  /** A length to saw to: rounded down, since a strut that is too long holds its frame open. */
  cut(mm: number | null): string;
  force(newton: number | null): string;
  /** T or C beside a force; nothing where it prints as nought or is unknown. */
  sense(newton: number | null): '' | 'T' | 'C';
  mass(kg: number | null): string;
  area(mm2: number | null): string;
  /** `decimals` of a cm³; an in³ gets one more, being sixteen times as much. */
  volume(mm3: number | null, decimals?: number): string;
  angle(rad: number | null): string;
}

/** The formatter of a job; `largest` is the largest force in N that it will print, and decides between N and kN. */
export function unitsOf(job: Job, largest: number): Units {
  return job.output.units === 'SI' ? si(largest) : us(largest, job.output.fractions);
}

function si(largest: number): Units {
  const kilo = largest >= 10_000;
  const decimals = kilo ? decimalsFor(largest / 1000) : decimalsFor(largest);
  return {
    lengthUnit: 'mm',
    forceUnit: kilo ? 'kN' : 'N',
    massUnit: 'kg',
    areaUnit: 'mm²',
    volumeUnit: 'cm³',
    words: `mm, ${kilo ? 'kN' : 'N'}, kg, °`,
    length: (mm, digits = 1) => fixed(mm, digits),
    cut: sawMillimetres,
    force: (n) => signed(n === null ? null : kilo ? n / 1000 : n, decimals),
    sense: (n) => senseOf(signed(n === null ? null : kilo ? n / 1000 : n, decimals)),
    mass: (kg) => fixed(kg, kg !== null && kg < 1 ? 3 : 2),
    area: (mm2) => fixed(mm2, 0),
    volume: (mm3, digits = 1) => fixed(mm3 === null ? null : mm3 / MM3_PER_CM3, digits),
    angle: (rad) => fixed(rad === null ? null : (rad * 180) / Math.PI, 1),
  };
}

/** A length to saw to in mm, rounded down to a tenth. */
export const sawMillimetres = (mm: number | null): string => fixed(down(mm, 0.1), 1);

export const NEWTON_PER_LBF = FORCE_IN_N.lbf;
const MM_PER_INCH = LENGTH_IN_MM.in;
const MM3_PER_CM3 = 1000;
/** The finest division of a carpenter's rule. */
const PARTS = 32;
/** What is asked for in more digits of a mm than this is no length for a rule: no fraction tells 0.03 mm from nought. */
const RULE_DIGITS = 1;

/** Share of a step by which a length may miss it and still count as on it: what sums and conversions leave. */
const ON_STEP = 1e-6;
const down = (mm: number | null, step: number): number | null =>
  mm === null ? null : Math.floor(mm / step + ON_STEP) * step;

function us(largest: number, fractions: boolean): Units {
  const kip = largest / NEWTON_PER_LBF >= 10_000;
  const per = NEWTON_PER_LBF * (kip ? 1000 : 1);
  const decimals = decimalsFor(largest / per);
  const length = (mm: number | null, digits = 1): string =>
    mm === null
      ? ''
      : fractions && digits <= RULE_DIGITS
        ? inchFraction(mm / MM_PER_INCH)
        : fixed(mm / MM_PER_INCH, digits + 2);
  return {
    lengthUnit: 'in',
    forceUnit: kip ? 'kip' : 'lbf',
    massUnit: 'lb',
    areaUnit: 'in²',
    volumeUnit: 'in³',
    words: `in, ${kip ? 'kip' : 'lbf'}, lb, °`,
    length,
    cut: (mm) => length(down(mm, fractions ? MM_PER_INCH / PARTS : MM_PER_INCH / 1000)),
    force: (n) => signed(n === null ? null : n / per, decimals),
    sense: (n) => senseOf(signed(n === null ? null : n / per, decimals)),
    mass: (kg) => fixed(kg === null ? null : kg / KG_IN_LB, 3),
    area: (mm2) => fixed(mm2 === null ? null : mm2 / MM_PER_INCH ** 2, 2),
    volume: (mm3, digits = 1) => fixed(mm3 === null ? null : mm3 / MM_PER_INCH ** 3, digits + 1),
    angle: (rad) => fixed(rad === null ? null : (rad * 180) / Math.PI, 1),
  };
}

/** Whole inches and the nearest thirty-second in lowest terms: 12 3/32. */
export function inchFraction(inches: number): string {
  const parts = Math.round(Math.abs(inches) * PARTS);
  const [whole, rest] = [Math.floor(parts / PARTS), parts % PARTS];
  const sign = inches < 0 && parts > 0 ? '−' : '';
  if (rest === 0) return `${sign}${whole}`;
  let [top, bottom] = [rest, PARTS];
  while (top % 2 === 0) [top, bottom] = [top / 2, bottom / 2];
  return whole === 0 ? `${sign}${top}/${bottom}` : `${sign}${whole} ${top}/${bottom}`;
}

/** Decimals that give the largest number about four figures. */
const decimalsFor = (largest: number): number => (largest >= 1000 ? 0 : largest >= 100 ? 1 : 2);

/** Fixed decimals with a true minus; blank for unknown; never minus nought. */
export function fixed(value: number | null | undefined, decimals: number): string {
  if (value === null || value === undefined || !Number.isFinite(value)) return '';
  const text = Math.abs(value).toFixed(decimals);
  return value < 0 && Number(text) !== 0 ? `−${text}` : text;
}

/** Fixed decimals with + or −: a force says whether it pulls. */
export function signed(value: number | null | undefined, decimals: number): string {
  const text = fixed(value, decimals);
  return text === '' || text.startsWith('−') || Number(text) === 0 ? text : `+${text}`;
}

const senseOf = (text: string): '' | 'T' | 'C' => (text.startsWith('+') ? 'T' : text.startsWith('−') ? 'C' : '');
