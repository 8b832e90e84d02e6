import { availableParallelism } from 'node:os';
import { Worker } from 'node:worker_threads';
import type { Each } from './each.js';
import type { Answer, Order } from './worker.js';

/** Worker threads that do named tasks. `each` is what stages are handed. */
export interface Pool {
  readonly each: Each;
  /** Ends the workers, also in the middle of their work. */
  close(): Promise<void>;
}

/** A task or a worker that failed; the message is the task's own. */
export class TaskFault extends Error {
  constructor(
    readonly task: string,
    message: string,
  ) {
    super(message);
    this.name = 'TaskFault';
  }
}

/** How far ahead of the output that is being taken inputs are handed out, per worker: this bounds the memory. */
const AHEAD = 4;

/**
 * Opens a pool over a worker entry, a module that calls `serve` with its tasks. Workers start with the first task. Inputs and outputs
 * are plain records and typed arrays (structured clone); the buffers of typed arrays are moved, not copied.
 * `workers`: at least 1; absent: one a processor, at most 8.
 */
export function openPool(entry: URL, workers = Math.min(8, availableParallelism())): Pool {
  const crew: Hand[] = [];
  let closed = false;
  const hands = (): readonly Hand[] => {
    // A worker that died, of memory say, has failed its task and is replaced.
    for (let i = crew.length - 1; i >= 0; i--) if (crew[i]!.dead) crew.splice(i, 1);
    while (crew.length < Math.max(1, workers)) crew.push(new Hand(entry));
    return crew;
  };
  return {
    async each<Input, Output>(
      task: string,
      inputs: readonly Input[],
      take: (output: Output, index: number) => void | Promise<void>,
    ): Promise<void> {
      if (closed) throw new TaskFault(task, 'the pool is closed');
      const running = hands().slice(0, inputs.length);
      const outputs = new Map<number, Output>();
      const ahead = AHEAD * running.length;
      let [next, taken] = [0, 0];
      let failure: unknown = null;
      let wake = (): void => {};
      /** Resolves with the next change. The promise is made before the state is looked at, so no change is missed. */
      let change = new Promise<void>((done) => {
        wake = done;
      });
      const changed = (): void => {
        const done = wake;
        change = new Promise((d) => {
          wake = d;
        });
        done();
      };
      const work = async (hand: Hand): Promise<void> => {
        while (failure === null && next < inputs.length) {
          if (next >= taken + ahead) {
            await change;
            continue;
          }
          const index = next++;
          outputs.set(index, (await hand.do(task, inputs[index])) as Output);
          changed();
        }
      };
      const deliver = async (): Promise<void> => {
        while (taken < inputs.length && failure === null) {
          if (!outputs.has(taken)) {
            await change;
            continue;
          }
          const output = outputs.get(taken) as Output;
          outputs.delete(taken);
          await take(output, taken);
          taken++;
          changed();
        }
      };
      const fail = (error: unknown): void => {
        failure ??= error;
        changed();
      };
      await Promise.all([...running.map((hand) => work(hand).catch(fail)), deliver().catch(fail)]);
      if (failure !== null) throw failure;
    },
    async close() {
      closed = true;
      await Promise.all(crew.splice(0).map((hand) => hand.end()));
    },
  };
}

/** One worker and the tasks that wait for its answers; it does them in the order they come. */
class Hand {
  readonly #worker: Worker;
  readonly #waiting = new Map<
    number,
    { task: string; done: (output: unknown) => void; fail: (error: Error) => void }
  >();
  #count = 0;
  #dead: string | null = null;

  constructor(entry: URL) {
    this.#worker = new Worker(entry);
    this.#worker.on('message', (answer: Answer) => {
      const waiting = this.#waiting.get(answer.id);
      this.#waiting.delete(answer.id);
      if (this.#waiting.size === 0) this.#worker.unref();
      if (!waiting) return;
      if ('error' in answer) waiting.fail(new TaskFault(waiting.task, answer.error));
      else waiting.done(answer.output);
    });
    this.#worker.on('error', (error: Error & { code?: string }) =>
      this.#stop(error.code === 'ERR_WORKER_OUT_OF_MEMORY' ? 'a worker ran out of memory' : error.message),
    );
    this.#worker.on('exit', () => this.#stop('a worker ended before its work was done'));
    // An idle worker does not keep the program alive.
    this.#worker.unref();
  }

  do(task: string, input: unknown): Promise<unknown> {
    return new Promise((done, fail) => {
      if (this.#dead !== null) return fail(new TaskFault(task, this.#dead));
      const id = this.#count++;
      this.#waiting.set(id, { task, done, fail });
      this.#worker.ref();
      const order: Order = { id, task, input };
      try {
        this.#worker.postMessage(order);
      } catch (error) {
        this.#waiting.delete(id);
        fail(error as Error);
      }
    });
  }

  get dead(): boolean {
    return this.#dead !== null;
  }

  async end(): Promise<void> {
    await this.#worker.terminate();
  }

  #stop(message: string): void {
    this.#dead ??= message;
    for (const { task, fail } of this.#waiting.values()) fail(new TaskFault(task, message));
    this.#waiting.clear();
  }
}
