import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { StrutPart } from '../model/parts.js';
import type { MemberActions, Utilisation } from '../model/solution.js';
import { standardFor } from './choose.js';
import type { Rules, Standard, Verdict } from './standard.js';

/** What the rules say of struts. */
export interface Judged {
  readonly utilisations: readonly Utilisation[];
  readonly findings: readonly Finding[];
}

/** The worst of one strut's combinations; null without any. */
export function worstOf(
  actions: readonly MemberActions[],
  judge: (a: MemberActions) => Verdict,
): { readonly actions: MemberActions; readonly verdict: Verdict } | null {
  let worst: { actions: MemberActions; verdict: Verdict } | null = null;
  for (const a of actions) {
    const verdict = judge(a);
    if (worst === null || verdict.utilisation > worst.verdict.utilisation) worst = { actions: a, verdict };
  }
  return worst;
}

/** Utilisation of every strut by its standard. A strut without section, material or actions has none; each reason is a finding. */
export function judgeMembers(
  struts: readonly StrutPart[],
  actions: readonly (readonly MemberActions[])[],
  job: Job,
  rules: Rules,
): Judged {
  const utilisations: Utilisation[] = [];
  const findings: Finding[] = [];
  const lacking = new Map<string, { standard: Standard; values: readonly string[]; count: number }>();
  struts.forEach((strut, i) => {
    const { section, material } = strut;
    if (section === null || material === null || (actions[i]?.length ?? 0) === 0) return;
    const standard = standardFor(job, material);
    const values = standard.missing(material);
    if (values.length > 0) {
      const before = lacking.get(material.name);
      lacking.set(material.name, { standard, values, count: (before?.count ?? 0) + 1 });
      return;
    }
    const member = {
      shape: section.shape,
      material,
      bucklingLength: strut.axisLength * job.strength.effectiveLength,
    };
    const reason = standard.outOfScope(member);
    if (reason !== null) {
      findings.push(finding('strength-out-of-scope', strut.mark, { about: { standard: standard.name, reason } }));
      return;
    }
    const worst = worstOf(actions[i]!, (a) => standard.judge(member, a, rules))!;
    const { utilisation, rule } = worst.verdict;
    const { combination, axial: force } = worst.actions;
    utilisations.push({ mark: strut.mark, kind: 'strut', at: null, combination, force, utilisation, rule });
    if (utilisation > 1)
      findings.push(
        finding('member-over-stressed', strut.mark, {
          value: utilisation,
          limit: 1,
          about: { rule, combination, force_N: force, section: section.name },
        }),
      );
  });
  for (const [material, { standard, values, count }] of lacking)
    findings.push(
      finding('material-value-missing', 'truss', {
        about: { material, standard: standard.name, struts: count, values: values.join(', ') },
      }),
    );
  return { utilisations, findings };
}
