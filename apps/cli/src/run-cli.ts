import { availableParallelism } from 'node:os';
import { interruptedError } from './compute/interrupted-error.js';
import { createSession } from './create-session.js';
import { EXIT_STATUS, type ExitStatus } from './exit-status.js';
import { guardStreams } from './output/guard-streams.js';
import { printError } from './output/print-error.js';
import { parseCommandLine } from './parse-command-line.js';
import type { Terminal } from './terminal.js';
import { loadVerb } from './verbs/load-verb.js';

/** Runs one command line and resolves to its exit code. Everything it prints goes to the terminal's streams. */
export async function runCli(argv: readonly string[], terminal: Terminal): Promise<ExitStatus> {
  const streams = guardStreams(terminal);
  const interruption = new AbortController();
  const interrupt = () => {
    terminal.off('SIGINT', interrupt);
    terminal.off('SIGTERM', interrupt);
    terminal.stdin.destroy();
    interruption.abort();
  };
  terminal.on('SIGINT', interrupt);
  terminal.on('SIGTERM', interrupt);
  const style = { json: namesOption(argv, '--json'), color: !namesOption(argv, '--no-color') };
  try {
    const asked = await parseCommandLine(argv, terminal);
    if (asked === null) {
      await streams.flush();
      return EXIT_STATUS.yes;
    }
    const verb = await loadVerb(asked.name);
    const plan = verb.plan(asked.raw, { processors: availableParallelism() });
    const options = { ...style, quiet: asked.raw.quiet === true };
    const session = createSession(terminal, options, interruption.signal);
    const status = await orInterrupted(verb.effect(plan, session), interruption.signal, session.kept);
    await streams.flush();
    return status;
  } catch (error) {
    return printError(error, terminal, style);
  } finally {
    terminal.off('SIGINT', interrupt);
    terminal.off('SIGTERM', interrupt);
    streams.release();
  }
}

/** Stops waiting as soon as the signal is aborted, whatever the effect waits for. */
async function orInterrupted<Result>(
  effect: Promise<Result>,
  signal: AbortSignal,
  kept: () => string | null,
): Promise<Result> {
  return new Promise((resolve, reject) => {
    signal.addEventListener('abort', () => reject(interruptedError(kept())), { once: true });
    effect.then(resolve, reject);
  });
}

/** Whether a flag stands among the options: needed before, and when, the command line cannot be parsed. */
function namesOption(argv: readonly string[], flag: string): boolean {
  const end = argv.indexOf('--');
  return (end === -1 ? argv : argv.slice(0, end)).includes(flag);
}
