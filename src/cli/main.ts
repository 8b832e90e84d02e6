import { Command, CommanderError } from 'commander';
import { VERSION } from '../model/version.js';
import { commands } from './commands/index.js';
import { EXIT } from './exit.js';
import { processTerminal, type Terminal } from './terminal/terminal.js';

const EXAMPLES = `
Examples:
  strutwright new my-table                       a folder with a job and a truss that work
  strutwright make my-table/job.json -o pack     every file and paper that a workshop needs
  strutwright check my-table/job.json            is it in balance, flat, strong enough?

`;

/** Runs one command line and gives its exit status; never throws. */
export async function run(argv: readonly string[], terminal: Terminal = processTerminal()): Promise<number> {
  let status: number = EXIT.clear;
  const program = new Command('strutwright')
    .description('Turns a spatial truss in equilibrium into everything a workshop needs to build it.')
    .version(VERSION, '-V, --version', 'print the version')
    .helpOption('-h, --help', 'print this help')
    .helpCommand('help [command]', 'print the help of a command')
    .addHelpText('before', EXAMPLES.trimStart())
    .showSuggestionAfterError(true)
    .exitOverride()
    .configureOutput({
      writeOut: (text) => terminal.result(text),
      writeErr: (text) => terminal.talk(text),
      outputError: (text, write) => write(`strutwright: ${text.replace(/^error: /, '')}`),
    });
  for (const command of commands) {
    const sub = program.command(command.usage).description(command.summary);
    command.define(sub);
    sub.addHelpText('before', `Examples:\n${command.examples.map((e) => `  ${e}`).join('\n')}\n`);
    sub.exitOverride().copyInheritedSettings(program);
    sub.action(async (...args: unknown[]) => {
      status = await command.run({ arguments: sub.args, options: sub.opts(), terminal });
      void args;
    });
  }
  try {
    if (argv.length === 0) {
      program.outputHelp();
      return EXIT.refused;
    }
    await program.parseAsync([...argv], { from: 'user' });
    return status;
  } catch (error) {
    if (error instanceof CommanderError) return error.exitCode === 0 ? EXIT.clear : EXIT.refused;
    terminal.talk(`${programFault(error)}\n`);
    return EXIT.fault;
  }
}

/** One line for a fault of the program; the trace only where a developer asks for it. */
function programFault(error: unknown): string {
  const text = error instanceof Error ? error.message : String(error);
  const trace = process.env.STRUTWRIGHT_TRACE && error instanceof Error ? `\n${error.stack}` : '';
  return `strutwright: a fault of the program, not of your files: ${text.split('\n')[0]}; nothing was written. Please report it with the job.${trace}`;
}
