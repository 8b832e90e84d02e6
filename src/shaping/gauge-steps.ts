import { clearance, LEAST_WALL, measuredSize } from '../detailing/systems/printing.js';
import type { Job } from '../model/job/index.js';
import type { Section } from '../model/section.js';

/** Steps of the ladder of clearances about the job's own, mm. */
const STEPS = [-0.2, -0.1, 0, 0.1, 0.2] as const;
/** Walls of the ladder of walls, as multiples of the process's least. */
const WALLS = [0.5, 0.75, 1, 1.5, 2] as const;
/** No socket is tried tighter than this, mm. */
const TIGHTEST = 0.05;

/** What of a section its joint fits: the strut goes into the hub, or the hub's spigot into a tube. */
export type GaugeKind = 'socket' | 'spigot';

/** How most nodes of the job take hold of a section. */
export const gaugeKind = (section: Section, job: Job): GaugeKind =>
  job.nodes.system === 'spigot' && section.shape.kind === 'tube' ? 'spigot' : 'socket';

/** Size that the gauge's joint is made for, mm: the largest measured outside, of a spigot the tube's inside. */
export function gaugeSize(section: Section, job: Job): number {
  const { shape } = section;
  const inside = shape.kind === 'tube' && gaugeKind(section, job) === 'spigot' ? 2 * shape.wall : 0;
  return measuredSize(section) - inside;
}

/** The clearances that the gauge tries, mm, the job's own in the middle, none twice. */
export function gaugeClearances(section: Section, job: Job): number[] {
  const own = clearance(job, section, gaugeSize(section, job));
  // A ladder that would start below nothing starts at the tightest instead, in the same steps.
  const lift = Math.max(0, TIGHTEST - (own + STEPS[0]));
  return STEPS.map((step) => Math.round((own + step + lift) * 100) / 100);
}

/** Thicknesses of the gauge's walls, mm, the process's least in the middle. */
export const gaugeWalls = (job: Job): number[] =>
  WALLS.map((share) => Math.round(LEAST_WALL[job.nodes['process']] * share * 100) / 100);
