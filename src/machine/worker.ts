import { parentPort } from 'node:worker_threads';

/** What the pool asks of a worker, and what it answers. */
export interface Order {
  readonly id: number;
  readonly task: string;
  readonly input: unknown;
}
export type Answer = { readonly id: number } & ({ readonly output: unknown } | { readonly error: string });

/** A task: a pure function of its input, so that it does not matter who does it, or when. */
export type Task = (input: never) => unknown;

/** Makes this thread a worker that does the named tasks. The one statement of a worker entry. */
export function serve(tasks: Readonly<Record<string, Task>>): void {
  const port = parentPort;
  if (!port) throw new Error('a worker entry runs in a worker thread only');
  port.on('message', async ({ id, task, input }: Order) => {
    try {
      const work = tasks[task];
      if (!work) throw new Error(`there is no task ${task}`);
      const output = await work(input as never);
      port.postMessage({ id, output } satisfies Answer, buffersOf(output));
    } catch (error) {
      const text = error instanceof Error ? error.message : String(error);
      port.postMessage({ id, error: text } satisfies Answer);
    }
  });
}

/** Buffers of the typed arrays in an output that they fill alone: those can be moved. A slice of a larger one is copied. */
function buffersOf(value: unknown, found = new Set<ArrayBuffer>()): ArrayBuffer[] {
  if (ArrayBuffer.isView(value)) {
    if (value.buffer instanceof ArrayBuffer && value.byteLength === value.buffer.byteLength) found.add(value.buffer);
  } else if (value && typeof value === 'object') {
    for (const part of Object.values(value)) buffersOf(part, found);
  }
  return [...found];
}
