import type { Command } from 'commander';
import type { Terminal } from '../terminal/terminal.js';

export interface Call {
  readonly arguments: readonly string[];
  readonly options: Readonly<Record<string, unknown>>;
  readonly terminal: Terminal;
}

/** One command of the program: a file in this folder and a line in its index. */
export interface CliCommand {
  /** As commander reads it: "make <job>". */
  readonly usage: string;
  readonly summary: string;
  /** Shown first in its help. */
  readonly examples: readonly string[];
  define(command: Command): void;
  /** Gives the exit status. */
  run(call: Call): Promise<number>;
}
