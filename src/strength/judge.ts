import type { Finding } from '../model/finding.js';
import { finding } from '../model/findings/index.js';
import type { Job } from '../model/job/index.js';
import type { Parts } from '../model/parts.js';
import type { Utilisation } from '../model/solution.js';
import type { Truss } from '../model/truss.js';
import { allActions, type Loading } from './actions.js';
import { judgeMembers } from './members.js';
import { panelCombinations } from './panel/combinations.js';
import { judgePanels } from './panels.js';
import { rulesOf } from './rules.js';
import { judgeSockets } from './sockets.js';
import { unverified } from './unverified.js';
import { useFindings } from './use.js';

/** Verdicts on every part, and what is wrong with them. */
export interface Judgement {
  /** Struts in the truss's order, then sockets by hub, then panels. A part that could not be judged has no entry. */
  readonly utilisations: readonly Utilisation[];
  readonly findings: readonly Finding[];
  /** "strength", in the one or the other. */
  readonly checked: readonly string[];
  readonly notChecked: readonly string[];
}

/**
 * Strength of the parts under every combination of the solution and under the given forces, whichever is worse.
 * Without a solution the given forces are judged alone, as pure axial forces with buckling from node to node.
 */
export function judge(truss: Truss, parts: Parts, loading: Loading, job: Job): Judgement {
  const rules = rulesOf(job);
  const actions = allActions(truss, loading, job);
  const loaded = actions.some((a) => a.some((one) => one.axial !== 0 || one.momentY !== 0 || one.momentZ !== 0));
  const members = judgeMembers(parts.struts, actions, job, rules);
  const sockets = judgeSockets(parts, actions, job, rules);
  const panels = judgePanels(truss, parts, panelCombinations(truss, job), job, rules);
  const utilisations = [...members.utilisations, ...sockets.utilisations, ...panels.utilisations];
  const judged = members.utilisations.length > 0;
  const doubtful = judged ? unverified(parts, job) : [];
  return {
    utilisations,
    findings: [
      ...members.findings,
      ...sockets.findings,
      ...panels.findings,
      ...useFindings(parts, job, loaded),
      ...(doubtful.length > 0
        ? [finding('values-unverified', 'truss', { about: { materials: doubtful.join(', ') } })]
        : []),
    ],
    checked: judged ? ['strength'] : [],
    notChecked: judged ? [] : ['strength'],
  };
}
