import type { ServiceClass } from '../model/catalogue/timber-factors.js';
import type { Material } from '../model/material.js';
import type { SectionShape } from '../model/section.js';
import type { MemberActions } from '../model/solution.js';

/** A member as a rule sees it. Lengths in mm. */
export interface MemberToJudge {
  readonly shape: SectionShape;
  readonly material: Material;
  /** Buckling length about both axes: node to node, times the job's factor. */
  readonly bucklingLength: number;
}

/** What the job says of the rules. */
export interface Rules {
  readonly serviceClass: ServiceClass;
  /** Factor of safety of the allowable-stress rule. */
  readonly factor: number;
}

/** Utilisation (1: just strong enough) by the check that governs, and that check's rule with its clause. */
export interface Verdict {
  readonly utilisation: number;
  readonly rule: string;
}

/** A set of rules for members. All of a standard that the program knows stands behind this. */
export interface Standard {
  readonly name: string;
  /** Symbols of the values that the material lacks and the rule cannot do without; empty: it can judge. */
  missing(material: Material): readonly string[];
  /** Why the rule does not cover this member (its class, its wall), in words; null: it does. */
  outOfScope(member: MemberToJudge): string | null;
  /** Verdict under one combination's actions (N, N mm, tension positive). */
  judge(member: MemberToJudge, actions: MemberActions, rules: Rules): Verdict;
}

/** The symbols of `wanted` that the material's strengths lack. */
export const lacking = (material: Material, wanted: readonly string[]): readonly string[] =>
  wanted.filter((symbol) => material.strength[symbol] === undefined);

/** The check with the highest utilisation; the first of equals. */
export function governing(checks: readonly Verdict[]): Verdict {
  let worst = checks[0]!;
  for (const check of checks) if (check.utilisation > worst.utilisation) worst = check;
  return worst;
}
