import type { Job } from '../../model/job/index.js';
import type { HubPart } from '../../model/parts.js';
import { type BasePlate, basePlate } from './base-plate.js';
import { type ClampParts, clampParts } from './clamp-parts.js';
import { type Sleeve, sleevesOf } from './sleeve.js';

/** The parts of a hub of sleeves: what its mass, its cover and its solid are made from. */
export interface HubShape {
  readonly sleeves: readonly Sleeve[];
  readonly base: BasePlate | null;
  /** Where a clamp is parted and screwed. */
  readonly clamp: ClampParts | null;
}

export function hubShape(hub: Pick<HubPart, 'sockets' | 'system'>, job: Job): HubShape {
  const foot = hub.system === 'foot';
  const sleeves = sleevesOf(hub.sockets, foot);
  return {
    sleeves,
    base: foot && sleeves.length > 0 ? basePlate(sleeves, job) : null,
    clamp: hub.system === 'clamp' && sleeves.length > 0 ? clampParts(sleeves, job) : null,
  };
}
