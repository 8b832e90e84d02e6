import type { Finding } from '../model/finding.js';
import type { Job } from '../model/job/index.js';
import type { Parts } from '../model/parts.js';
import type { Utilisation } from '../model/solution.js';
import type { Truss } from '../model/truss.js';
import type { Judged } from './members.js';
import { panelCorners } from './panel/corners.js';
import { judgePanel } from './panel/judge-panel.js';
import type { PanelCombination } from './panel/load.js';
import type { Rules } from './standard.js';

/** Utilisation of every panel that has an outline, in the parts' order, under the combinations' pressures and its own weight. */
export function judgePanels(
  truss: Truss,
  parts: Parts,
  combinations: readonly PanelCombination[],
  job: Job,
  rules: Rules,
): Judged {
  const cornersOf = panelCorners(truss);
  const utilisations: Utilisation[] = [];
  const findings: Finding[] = [];
  for (const part of parts.panels) {
    const judged = judgePanel(part, cornersOf(part), combinations, job, rules);
    if (judged.utilisation) utilisations.push(judged.utilisation);
    findings.push(...judged.findings);
  }
  return { utilisations, findings };
}
