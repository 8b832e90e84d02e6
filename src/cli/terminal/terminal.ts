/** Where a command speaks: results to stdout, talk to stderr. Handed in, so that tests can listen. */
export interface Terminal {
  result(text: string): void;
  talk(text: string): void;
  /** Whether a person watches stderr: progress is shown to nobody else. */
  readonly watched: boolean;
  /** Whether colour is wanted on stdout (never in a pipe, nor with NO_COLOR set). */
  readonly colour: boolean;
  readonly columns: number;
}

export function processTerminal(): Terminal {
  return {
    result: (text) => void process.stdout.write(text),
    talk: (text) => void process.stderr.write(text),
    watched: process.stderr.isTTY === true && process.env.TERM !== 'dumb',
    colour: process.stdout.isTTY === true && !process.env.NO_COLOR && process.env.TERM !== 'dumb',
    columns: process.stdout.columns ?? 100,
  };
}
