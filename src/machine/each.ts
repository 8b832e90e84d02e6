/**
 * Does the named task on every input and hands the outputs over in the inputs' order, a few at a time: the same results
 * whoever does the work. The type of a stage run's `each`.
 */
export type Each = <Input, Output>(
  task: string,
  inputs: readonly Input[],
  take: (output: Output, index: number) => void | Promise<void>,
) => Promise<void>;
