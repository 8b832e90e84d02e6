import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { StrutPart } from '../model/parts.js';
import type { MemberActions, Utilisation } from '../model/solution.js';
import type { Rules, Standard } from './standard.js';
import { judgeStrut } from './strut.js';

/** Verdicts on parts of one kind, and what is wrong with them. */
export interface Judged {
  readonly utilisations: readonly Utilisation[];
  readonly findings: readonly Finding[];
}

/** Utilisation of every strut by its standard. A strut without section, material or actions has none; each other reason is a finding. */
export function judgeMembers(
  struts: readonly StrutPart[],
  actions: readonly (readonly MemberActions[])[],
  job: Job,
  rules: Rules,
): Judged {
  const utilisations: Utilisation[] = [];
  const findings: Finding[] = [];
  const lacking = new Map<string, { standard: Standard; values: readonly string[]; count: number }>();
  // Where people are under it or weather is on it, a strut that nothing judged is not built.
  const level = job.use === 'outdoor' || job.use === 'overhead' ? 'stop' : 'warn';
  const unknown = new Map<string, { material: string; count: number }>();
  struts.forEach((strut, i) => {
    const { section, material } = strut;
    if (section !== null && material === null) {
      const before = unknown.get(section.name)?.count ?? 0;
      unknown.set(section.name, { material: section.material, count: before + 1 });
    }
    if (section === null || material === null || (actions[i]?.length ?? 0) === 0) return;
    const said = judgeStrut(section.shape, material, strut.axisLength, actions[i]!, job, rules);
    if (said.kind === 'lacking') {
      const { standard, values } = said;
      lacking.set(material.name, { standard, values, count: (lacking.get(material.name)?.count ?? 0) + 1 });
      return;
    }
    if (said.kind === 'out-of-scope') {
      const about = { standard: said.standard.name, reason: said.reason };
      findings.push(finding('strength-out-of-scope', strut.mark, { level, about }));
      return;
    }
    const { utilisation, rule } = said.verdict;
    const { combination, axial: force } = said.actions;
    utilisations.push({ mark: strut.mark, kind: 'strut', at: null, combination, force, utilisation, rule });
    if (utilisation > 1) {
      const about = { rule, combination, force_N: force, section: section.name };
      findings.push(finding('member-over-stressed', strut.mark, { value: utilisation, limit: 1, about }));
    }
  });
  for (const [material, { standard, values, count }] of lacking) {
    const about = { material, standard: standard.name, struts: count, values: values.join(', ') };
    findings.push(finding('material-value-missing', 'truss', { level, about }));
  }
  for (const [section, { material, count }] of unknown)
    findings.push(finding('section-material-unknown', 'truss', { value: count, about: { section, material } }));
  return { utilisations, findings };
}
