import { now } from '../machine/clock.js';
import type { Task } from '../machine/worker.js';
import { type Lane, nestLane } from '../planning/nesting/lane.js';
import { shapeHubTask } from './stages/shape-hub-task.js';

/** What a worker can do, by name. The same tasks run in this thread where there is no pool. */
export const TASKS: Readonly<Record<string, Task>> = {
  'shape-hub': shapeHubTask as Task,
  'nest-lane': ((lane: Lane) => nestLane(lane, now)) as Task,
};
