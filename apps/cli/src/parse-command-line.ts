import { ThalwegError } from '@thalweg/core';
import { CommanderError, type Command } from 'commander';
import { terminalWidth } from './output/terminal-width.js';
import { createProgram } from './program.js';
import { suggest } from './suggest.js';
import type { Terminal } from './terminal.js';
import type { VerbName } from './verbs/load-verb.js';
import type { RawOptions } from './verbs/verb.js';

export interface AskedVerb {
  readonly name: VerbName;
  readonly raw: RawOptions;
}

/**
 * Reads a command line. Resolves to the verb that was asked for, or to null when help or the version was printed.
 * Throws `usage` for everything that the grammar does not know.
 */
export async function parseCommandLine(argv: readonly string[], terminal: Terminal): Promise<AskedVerb | null> {
  let asked: AskedVerb | null = null;
  const program = createProgram(async (name, raw) => {
    asked = { name, raw };
  });
  if (argv.length === 0) throw new ThalwegError('usage', `expected a verb, got none; thalweg --help lists them`);
  refuseUnknownVerbs(program);
  for (const command of [program, ...program.commands]) {
    command.exitOverride().configureOutput({
      writeOut: (text) => terminal.stdout.write(text),
      writeErr: () => undefined,
      getOutHelpWidth: () => terminalWidth(terminal.stdout),
      getOutHasColors: () => false,
    });
  }
  try {
    await program.parseAsync([...argv], { from: 'user' });
  } catch (error) {
    if (!(error instanceof CommanderError)) throw error;
    if (error.exitCode === 0) return null;
    throw new ThalwegError('usage', explain(error));
  }
  return asked;
}

function refuseUnknownVerbs(program: Command): void {
  const verbs = program.commands.map((command) => command.name());
  program.on('command:*', ([given]: string[]) => {
    const near = given === undefined ? null : suggest(given, verbs);
    const hint = near === null ? 'thalweg --help lists them' : `did you mean "${near}"?`;
    throw new ThalwegError('usage', `expected a verb, got "${given}"; ${hint}`);
  });
}

/** Commander's own wording without its prefix, on one line. */
function explain(error: CommanderError): string {
  const text = error.message.replace(/^error: /, '').replace(/\s*\n\s*/g, ' ');
  return error.code === 'commander.help' ? 'expected a verb, got none; thalweg --help lists them' : text;
}
