import { entry, num } from './entry.js';

/** Findings on panels and sheets. */
export const PANEL_FINDINGS = {
  'panel-not-flat': entry(
    'stop',
    'panel',
    'mm',
    (f) =>
      `its face is out of flat by ${num(f.value)} mm, more than the ${num(f.limit)} mm its seat can take; no outline is written`,
    { withholds: true },
  ),
  'panel-vanishes': entry(
    'stop',
    'panel',
    '',
    () => 'nothing is left of it inside the struts and hubs; leave the face open or use thinner struts',
    { withholds: true },
  ),
  'panel-larger-than-sheet': entry(
    'stop',
    'panel',
    'mm',
    () => 'fits on no sheet; add a larger sheet or split the panel',
  ),
  'sheets-run-out': entry('stop', 'panel', '', () => 'has no sheet left; raise "available" or add another sheet'),
} as const;
