import type { Task } from '../machine/worker.js';
import { shapeHubTask } from './stages/shape-hub-task.js';

/** What a worker can do, by name. The same tasks run in this thread where there is no pool. */
export const TASKS: Readonly<Record<string, Task>> = {
  'shape-hub': shapeHubTask as Task,
};
