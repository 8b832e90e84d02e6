import { sayHold } from '../detailing/panels/holding.js';
import type { Job } from '../model/job/index.js';
import type { PanelPart } from '../model/parts.js';
import type { Truss } from '../model/truss.js';
import { panelCorners } from './panel/corners.js';
import { holdCapacity } from './panel/hold-capacity.js';
import type { Rules } from './standard.js';

/** The panels with what their holding bears for pressure and for suction; those without an outline as they are. */
export function statedHolds(truss: Truss, panels: readonly PanelPart[], job: Job, rules: Rules): readonly PanelPart[] {
  const cornersOf = panelCorners(truss);
  return panels.map((panel) => {
    if (!panel.hold || panel.hold.by === 'none' || panel.outline.length < 3) return panel;
    const hold = { ...panel.hold, ...holdCapacity(panel, cornersOf(panel), job, rules) };
    return { ...panel, hold, holding: sayHold(hold) };
  });
}
