import type { Terminal } from './terminal/terminal.js';

/** What Ctrl+C and a request to end do while something is being written. */
export interface StopSignals {
  /** What is to be done before the process ends; gives the sentence that says so. null: nothing is. */
  before(last: (() => Promise<string>) | null): void;
  /** Leaves the signals to the system again. */
  forget(): void;
}

/** Numbers of the signals that are awaited (POSIX.1-2017, signal.h and kill). */
const SIGNALS = { SIGHUP: 1, SIGINT: 2, SIGTERM: 15 } as const;

/** A process that a signal ends has this much more than its number as its exit status (POSIX.1-2017, Shell, 2.8.2). */
const ENDED_BY = 128;

/** Finishes or undoes what is half done when a signal asks to end, then ends with 128 and the signal's number; a second signal ends at once. */
export function stopSignals(terminal: Terminal): StopSignals {
  let last: (() => Promise<string>) | null = null;
  let stopping = false;
  const stop = (signal: NodeJS.Signals): void => {
    const status = ENDED_BY + SIGNALS[signal as keyof typeof SIGNALS];
    if (stopping || !last) process.exit(status);
    stopping = true;
    // What cannot be undone now is cleared by the next run.
    void last()
      .then((words) => terminal.talk(`${words}\n`))
      .catch(() => {})
      .then(() => process.exit(status));
  };
  for (const signal of Object.keys(SIGNALS)) process.on(signal as NodeJS.Signals, stop);
  return {
    before(next) {
      last = next;
    },
    forget() {
      for (const signal of Object.keys(SIGNALS)) process.off(signal as NodeJS.Signals, stop);
    },
  };
}
