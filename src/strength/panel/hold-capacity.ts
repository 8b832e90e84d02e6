import { coarsePolygon } from '../../maths/polygon/coarse.js';
import type { Job } from '../../model/job/index.js';
import type { PanelPart, Point2 } from '../../model/parts.js';
import type { Rules } from '../standard.js';
import { PANEL_LIMITS } from './limits.js';
import { type Plate, plateOf } from './plate.js';
import { panelSupports, type Sense } from './supports.js';

/**
 * The evenly spread load, N, under which the first of these reaches its limit: force on the worst fixing, what one fixing
 * holds; bow, half of the bite of a channel or clip; bending stress, fm over the rules' factor. Load of short duration.
 *
 * Infinity: the panel is pressed onto its struts. null: nobody has said what one fixing holds. 0: what there is lets it go.
 *
 * @param corners the face's nodes in the panel's frame, mm
 */
export function holdCapacity(
  given: PanelPart,
  corners: readonly Point2[],
  job: Job,
  rules: Rules,
): { readonly pressure: number | null; readonly suction: number | null } {
  const part = { ...given, outline: coarsePolygon(given.outline, PANEL_LIMITS.coarse * Math.sqrt(given.area)) };
  let plate: Plate | null = null;
  const inSense = (sense: Sense): number | null => {
    if (part.seating === (sense === 'pressure' ? 'over' : 'under')) return Number.POSITIVE_INFINITY;
    const { holdBy, fixingCapacity_N: each } = job.panels;
    if (holdBy === 'none') return 0;
    if (holdBy !== 'channel' && each === undefined) return null;
    const bite = part.hold?.bite ?? null;
    if (bite !== null && bite <= 0) return 0;
    plate ??= plateOf(part.outline, part.material?.poisson ?? PANEL_LIMITS.poisson);
    const supports = panelSupports(part, corners, job, sense);
    const bent = supports && plate?.bend(supports);
    if (!bent) return 0;
    return part.area * Math.min(...limitsOf(part, bent, bite, each, rules));
  };
  return { pressure: inSense('pressure'), suction: inSense('suction') };
}

/** Pressures, MPa, at which each limit is reached; never empty for a panel in a channel. */
function limitsOf(
  part: PanelPart,
  { deflection, moment, forces }: NonNullable<ReturnType<Plate['bend']>>,
  bite: number | null,
  each: number | undefined,
  rules: Rules,
): number[] {
  const limits: number[] = [];
  const { material, thickness } = part;
  if (forces.length > 0 && each !== undefined) limits.push(each / Math.max(...forces));
  if (!material) return limits;
  const nu = material.poisson ?? PANEL_LIMITS.poisson;
  const stiffness = (material.modulus * thickness ** 3) / (12 * (1 - nu * nu));
  if (bite !== null) limits.push((PANEL_LIMITS.shareOfBite * bite * stiffness) / deflection);
  const bending = material.strength['fm'] ?? material.strength['ft'];
  if (bending !== undefined)
    limits.push((Math.max(0, bending / rules.factor - (part.bendStress ?? 0)) * thickness ** 2) / (6 * moment));
  return limits;
}
