import type { Finding } from '../model/finding.js';
import type { SizeChoice } from '../model/sizing.js';
import { findingReport } from './check-json.js';

/** A sizing as data for scripts; masses in kg, null where not known. */
export function sizingReport(sizing: {
  readonly choices: readonly SizeChoice[];
  readonly rounds: number;
  readonly massBefore: number | null;
  readonly massAfter: number | null;
  readonly findings: readonly Finding[];
}): object {
  return {
    format: 'strutwright-size/1',
    rounds: sizing.rounds,
    massBefore_kg: sizing.massBefore,
    massAfter_kg: sizing.massAfter,
    sections: sizing.choices.map(({ name, struts, from, to, utilisation, rule }) => ({
      name,
      struts,
      from,
      to,
      utilisation,
      rule,
    })),
    findings: sizing.findings.map(findingReport),
  };
}
