import type { Job } from '../model/job/index.js';
import type { Material } from '../model/material.js';
import type { SectionShape } from '../model/section.js';
import type { MemberActions } from '../model/solution.js';
import { standardFor } from './choose.js';
import type { Rules, Standard, Verdict } from './standard.js';

/** What a standard says of one strut: a verdict, or why there is none. */
export type StrutVerdict =
  | { readonly kind: 'judged'; readonly actions: MemberActions; readonly verdict: Verdict }
  | { readonly kind: 'lacking'; readonly standard: Standard; readonly values: readonly string[] }
  | { readonly kind: 'out-of-scope'; readonly standard: Standard; readonly reason: string };

/** The worst verdict on a strut of a section over its combinations (at least one). `axisLength` is node to node, mm. */
export function judgeStrut(
  shape: SectionShape,
  material: Material,
  axisLength: number,
  actions: readonly MemberActions[],
  job: Job,
  rules: Rules,
): StrutVerdict {
  const standard = standardFor(job, material);
  const values = standard.missing(material);
  if (values.length > 0) return { kind: 'lacking', standard, values };
  const member = { shape, material, bucklingLength: axisLength * job.strength.effectiveLength };
  const reason = standard.outOfScope(member);
  if (reason !== null) return { kind: 'out-of-scope', standard, reason };
  let worst = { actions: actions[0]!, verdict: standard.judge(member, actions[0]!, rules) };
  for (const a of actions.slice(1)) {
    const verdict = standard.judge(member, a, rules);
    if (verdict.utilisation > worst.verdict.utilisation) worst = { actions: a, verdict };
  }
  return { kind: 'judged', ...worst };
}
