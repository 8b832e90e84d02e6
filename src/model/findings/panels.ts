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
  'panel-in-pieces': entry(
    'stop',
    'panel',
    '',
    (f) =>
      `struts and hubs cut it into ${num(f.value)} pieces; only the largest would be held, so no outline is written: leave the face open or use smaller hubs`,
    { withholds: true },
  ),
  'panel-neck': entry(
    'warn',
    'panel',
    'mm',
    (f) =>
      `has a neck thinner than its thickness of ${num(f.limit)} mm; it will break there: use another corner or smaller hubs`,
  ),
  'panel-not-held': entry(
    'warn',
    'panel',
    '',
    (f) => `is held by nothing${f.about?.['why'] ? `: ${f.about['why']}` : ''}; choose what holds it (panels.holdBy)`,
  ),
  'panel-material-unknown': entry(
    'stop',
    'panel',
    '',
    (f) => `its material ${f.about?.['material']} is in neither the catalogue nor the job; name one that is`,
    { withholds: true },
  ),
  'panel-hole-near-edge': entry(
    'warn',
    'panel',
    'mm',
    (f) =>
      `has a hole whose middle is ${num(f.value)} mm from its edge, less than ${num(f.limit)} mm; it may tear out: move the holes in`,
  ),
  'panel-heavy': entry(
    'warn',
    'panel',
    'kg',
    (f) => `weighs ${num(f.value, 1)} kg, more than the ${num(f.limit)} kg that one person lifts; two people`,
  ),
  'panel-hazard': entry(
    'stop',
    'panel',
    '',
    (f) => `${f.about?.['hazard']}; cut it by saw or router, or choose another material`,
    { waivable: false, withholds: true },
  ),
  'panel-without-mark': entry(
    'warn',
    'panel',
    'mm',
    () => 'has no room for its mark; stick a label on its outer side before it leaves the machine',
  ),
  'panel-bevel-by-hand': entry(
    'note',
    'panel',
    '',
    () => 'has bevelled edges, which a laser cuts square: its outline is that of the larger face, bevel it afterwards',
  ),
  'panel-split': entry(
    'note',
    'panel',
    'mm',
    (f) => `its face is out of flat by ${num(f.value)} mm, so it is made in parts: ${f.about?.['parts']}`,
  ),
  'panel-folded': entry(
    'note',
    'panel',
    'mm',
    (f) => `its face is out of flat by ${num(f.value)} mm, so it is scored and folded along the engraved line`,
  ),
  'panel-bent': entry(
    'note',
    'panel',
    'MPa',
    (f) => `is bent cold onto its face; the sheet bears ${num(f.value, 1)} of ${num(f.limit, 1)} MPa for good`,
  ),
  'panel-bends-too-much': entry(
    'stop',
    'panel',
    'MPa',
    (f) =>
      `bent cold onto its face the sheet would bear ${num(f.value, 1)} MPa, more than ${num(f.limit, 1)}; use a thinner sheet or split it`,
    { withholds: true },
  ),
} as const;
