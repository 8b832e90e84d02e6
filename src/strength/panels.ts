import { dot, subtract } from '../maths/vec3.js';
import type { Finding } from '../model/finding.js';
import type { Job } from '../model/job/index.js';
import type { PanelPart, Parts, Point2 } from '../model/parts.js';
import type { Utilisation } from '../model/solution.js';
import type { Truss } from '../model/truss.js';
import type { Judged } from './members.js';
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
  const at = new Map(truss.nodes.map((n) => [n.mark, n.at]));
  const cornersOf = ({ frame, edges }: PanelPart): readonly Point2[] =>
    edges.map((edge) => {
      const d = subtract(at.get(edge.from)!, frame.origin);
      return [dot(d, frame.x), dot(d, frame.y)];
    });
  const utilisations: Utilisation[] = [];
  const findings: Finding[] = [];
  for (const part of parts.panels) {
    const judged = judgePanel(part, cornersOf(part), combinations, job, rules);
    if (judged.utilisation) utilisations.push(judged.utilisation);
    findings.push(...judged.findings);
  }
  return { utilisations, findings };
}
