import type { Finding } from '../../model/finding.js';
import { finding } from '../../model/findings/index.js';
import type { FitUp } from '../../model/fit-up.js';

/** A chance of closing below the wanted one, with the saw's tolerance that would do. */
export function fitUpFindings(fitUp: FitUp | null): readonly Finding[] {
  if (!fitUp || fitUp.chance >= fitUp.wanted) return [];
  const mend =
    fitUp.cutNeeded_mm === null
      ? 'not even perfect cuts reach it: give the struts more end float'
      : `cut to ${fitUp.cutNeeded_mm.toFixed(2)} mm, or give the struts more end float`;
  return [finding('fit-up-chance', 'truss', { value: fitUp.chance, limit: fitUp.wanted, about: { mend } })];
}
