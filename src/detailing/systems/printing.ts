import type { Job } from '../../model/job/index.js';
import type { Material } from '../../model/material.js';
import type { Section } from '../../model/section.js';

export type Process = Job['nodes']['process'];

/** Diametral clearance of a printed socket over the largest measured rod, mm, up to a diameter. Derived from published fits of printed parts. */
const CLEARANCE: readonly (readonly [upTo: number, Readonly<Record<Process, number>>])[] = [
  [6, { filament: 0.35, powder: 0.35, resin: 0.2 }],
  [10, { filament: 0.4, powder: 0.4, resin: 0.25 }],
  [16, { filament: 0.45, powder: 0.4, resin: 0.3 }],
  [25, { filament: 0.55, powder: 0.5, resin: 0.35 }],
  [Number.POSITIVE_INFINITY, { filament: 0.7, powder: 0.65, resin: 0.45 }],
];

/** Least wall that prints, and the wall a socket is given, mm. Seen in published design guides of the processes. */
export const LEAST_WALL: Readonly<Record<Process, number>> = { filament: 0.8, powder: 0.7, resin: 0.6 };
const GOOD_WALL: Readonly<Record<Process, number>> = { filament: 1.6, powder: 1.2, resin: 1 };

/** Swelling of timber across the grain in per cent for each per cent of moisture. From memory: 0.3 for softwoods, 0.4 for beech. */
const SWELLING = { beech: 0.4, other: 0.3 } as const;

/** Size across the section that its socket is bored for: the largest measured, else the nominal one. */
export function measuredSize(section: Section): number {
  const { shape } = section;
  const nominal = shape.kind === 'rectangle' ? Math.max(shape.width, shape.height) : shape.diameter;
  return Math.max(section.measured ?? nominal, 0);
}

/** What timber of a size grows by outdoors, mm. */
export function swelling(job: Job, material: Material | null, size: number): number {
  if (job.use !== 'outdoor' || (material?.family !== 'timber' && material?.family !== 'glulam')) return 0;
  const rate = /beech/i.test(material.name) ? SWELLING.beech : SWELLING.other;
  return (rate / 100) * job.fit.moistureChange * size;
}

/** Clearance of a socket over the strut's size, both across, mm: what the section's gauge gave, else the job's, else by process and size. */
export const clearance = (job: Job, section: Section, size: number): number =>
  ownClearance(job, section) ?? CLEARANCE.find(([upTo]) => size <= upTo)![1][job.nodes['process']];

/** The clearance that the job gives a section, mm; null: none, the process's starting value holds. */
export const ownClearance = (job: Job, section: Section): number | null =>
  gaugedClearance(job, section) ?? job.nodes.clearance_mm ?? null;

const gaugedClearance = ({ nodes }: Job, { name }: Section): number | null =>
  Object.hasOwn(nodes.clearances, name) ? nodes.clearances[name]! : null;

/** Whether the job says that the section's clearance comes from a printed gauge. */
export const isMeasured = (job: Job, section: Section): boolean =>
  job.nodes.clearanceMeasured || gaugedClearance(job, section) !== null;

/** What a bore that stands upright while it prints comes out narrower, mm: 0.1 to 0.3 of filament, seen in published design guides. */
const UPRIGHT_SHRINKS: Readonly<Record<Process, number>> = { filament: 0.2, powder: 0, resin: 0 };

/**
 * What a bore is drawn wider across, mm, so that it fits as it is printed: the job's allowances for upright and level bores, between
 * them by the square of the cosine (a bore's rings are cut at that slant; ours, no source).
 *
 * @param rise cosine of the angle between the bore and the upright while it prints; absent: the most of any
 */
export function boreAllowance(job: Job, rise?: number): number {
  const { upright_mm, lying_mm } = job.nodes.allowance;
  const upright = upright_mm ?? UPRIGHT_SHRINKS[job.nodes['process']];
  return rise === undefined ? Math.max(upright, lying_mm) : lying_mm + (upright - lying_mm) * rise * rise;
}

/** Wall of a sleeve round a strut of a size, mm: the job's, else the process's good wall and at least a quarter of the strut. */
export const sleeveWall = (job: Job, size: number): number =>
  job.nodes.wall_mm ?? Math.max(GOOD_WALL[job.nodes['process']], size / 4);
