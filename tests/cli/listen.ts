import { run } from '../../src/cli/main.js';
import type { Terminal } from '../../src/cli/terminal/terminal.js';

/** The program in this process, before a terminal that nobody watches: what its last command said on stdout and talked on stderr. */
export function listen() {
  const heard = {
    said: '',
    talked: '',
    terminal: {
      result: (text) => {
        heard.said += text;
      },
      talk: (text) => {
        heard.talked += text;
      },
      watched: false,
      colour: false,
      columns: 100,
    } as Terminal,
    /** Gives the exit status. */
    strutwright(...argv: string[]): Promise<number> {
      heard.said = '';
      heard.talked = '';
      return run(argv, heard.terminal);
    },
  };
  return heard;
}
