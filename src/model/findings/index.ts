import type { Finding, FindingEntry, SubjectKind } from '../finding.js';
import { ASSEMBLY_FINDINGS } from './assembly.js';
import { INPUTS_FINDINGS } from './inputs.js';
import { NODE_FINDINGS } from './nodes.js';
import { PANEL_FINDINGS } from './panels.js';
import { RECIPROCAL_FINDINGS } from './reciprocal.js';
import { SIZE_FINDINGS } from './sizes.js';
import { STATICS_FINDINGS } from './statics.js';
import { STOCK_FINDINGS } from './stock.js';
import { STRENGTH_FINDINGS } from './strength.js';
import { STRUT_FINDINGS } from './struts.js';
import { TRUSS_FINDINGS } from './truss.js';
import { WAIVER_FINDINGS } from './waivers.js';

/** The catalogue of findings: every problem the program can report, by code. */
export const FINDINGS = {
  ...TRUSS_FINDINGS,
  ...STRUT_FINDINGS,
  ...NODE_FINDINGS,
  ...PANEL_FINDINGS,
  ...STATICS_FINDINGS,
  ...STRENGTH_FINDINGS,
  ...SIZE_FINDINGS,
  ...RECIPROCAL_FINDINGS,
  ...STOCK_FINDINGS,
  ...ASSEMBLY_FINDINGS,
  ...INPUTS_FINDINGS,
  ...WAIVER_FINDINGS,
} as const;

export type FindingCode = keyof typeof FINDINGS;

/** Makes a finding of a code; level, kind and unit come from the catalogue unless given. */
export function finding(
  code: FindingCode,
  subject: string,
  numbers: {
    readonly value?: number | null;
    readonly limit?: number | null;
    readonly level?: Finding['level'];
    readonly kind?: SubjectKind;
    readonly about?: Finding['about'];
  } = {},
): Finding {
  const entry: FindingEntry = FINDINGS[code];
  return {
    level: numbers.level ?? entry.level,
    code,
    subject,
    kind: numbers.kind ?? entry.kind,
    value: finiteOrNull(numbers.value),
    limit: finiteOrNull(numbers.limit),
    unit: entry.unit,
    ...(numbers.about ? { about: numbers.about } : {}),
  };
}

const finiteOrNull = (value: number | null | undefined): number | null =>
  value !== null && value !== undefined && Number.isFinite(value) ? value : null;

/** The finding's sentence, subject first. */
export function sayFinding(finding: Finding): string {
  const entry: FindingEntry = FINDINGS[finding.code as FindingCode];
  return `${finding.subject === 'truss' ? 'The truss' : finding.subject}: ${entry.words(finding)}`;
}
