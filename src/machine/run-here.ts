import type { Each } from './each.js';
import type { Task } from './worker.js';

/** `each` without workers: the same tasks, one after the other in this thread. What library callers get who bring no pool. */
export const runHere =
  (tasks: Readonly<Record<string, Task>>): Each =>
  async (task, inputs, take) => {
    const work = tasks[task];
    if (!work) throw new Error(`there is no task ${task}`);
    for (const [index, input] of inputs.entries()) await take((await work(input as never)) as never, index);
  };
