import type { CliCommand } from './command.js';

/** The commands, in the order of the help. */
export const commands: readonly CliCommand[] = [];
