/** How far a stage is. */
export interface Progress {
  readonly stage: string;
  readonly done: number;
  /** 0 where it is not known how much there is. */
  readonly total: number;
}

/**
 * What a stage is handed beside its records: a seed, a way to tell how far it is, and a way to have many alike things
 * done, perhaps in parallel. `each` runs the named task on every input and hands the outputs over in the inputs' order,
 * whatever the number of workers, a few at a time, so that outputs need not fit in memory together.
 */
export interface Run {
  readonly seed: number;
  tell(progress: Progress): void;
  each<Input, Output>(
    task: string,
    inputs: readonly Input[],
    take: (output: Output, index: number) => void | Promise<void>,
  ): Promise<void>;
}
