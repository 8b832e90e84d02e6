import { EXIT } from '../exit.js';

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

/** The terminal of this process. A reader that has had enough (`| head`) ends nothing: the work goes on unheard. */
export function processTerminal(): Terminal {
  for (const stream of [process.stdout, process.stderr]) {
    if (!stream.listeners('error').includes(unheard)) stream.on('error', unheard);
  }
  return {
    result: (text) => void process.stdout.write(text),
    talk: (text) => void process.stderr.write(text),
    watched: process.stderr.isTTY === true && process.env.TERM !== 'dumb',
    colour: process.stdout.isTTY === true && !process.env.NO_COLOR && process.env.TERM !== 'dumb',
    columns: process.stdout.columns ?? 100,
  };
}

function unheard(error: NodeJS.ErrnoException): void {
  if (error.code === 'EPIPE') return;
  // A full disk behind `> file`: the caller must not take half a result for a whole one.
  process.stderr.write(`strutwright: the output could not be written (${error.code ?? error.message})\n`);
  process.exit(EXIT.fault);
}
