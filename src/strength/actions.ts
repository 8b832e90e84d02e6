import type { Job } from '../model/job/index.js';
import type { MemberActions, Solution } from '../model/solution.js';
import { GIVEN_CASE, type Truss } from '../model/truss.js';

/** A pure axial force as member actions. */
export const axialOnly = (combination: string, axial: number, duration: MemberActions['duration']): MemberActions => ({
  combination,
  axial,
  shearY: 0,
  shearZ: 0,
  momentY: 0,
  momentZ: 0,
  torsion: 0,
  duration,
});

/** What the parts are judged under. */
export interface Loading {
  /** Member forces of the job's source by member index, N, tension positive; null: those of the truss file, where it has any. */
  readonly forces: Float64Array | null;
  readonly solution: Solution | null;
}

/**
 * Every combination's actions by member index: the solution's, and the given forces beside them where it has not taken them up.
 * A given force acts alone, axially, for the job's load duration.
 */
export function allActions(truss: Truss, loading: Loading, job: Job): readonly (readonly MemberActions[])[] {
  const { forces, solution } = loading;
  return truss.members.map((member, i) => {
    const solved = solution?.actions[i] ?? [];
    const force = forces ? forces[i]! : member.force;
    if (force === null || solved.some((a) => a.combination === GIVEN_CASE)) return solved;
    return [axialOnly(GIVEN_CASE, force, job.strength.duration), ...solved];
  });
}
