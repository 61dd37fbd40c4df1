import { completionScript } from '../../completion/completion-script.js';
import { describeGrammar } from '../../completion/grammar.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { createProgram } from '../../program.js';
import type { Session } from '../../session.js';
import type { CompletionPlan } from './plan.js';

/** Writes the completion script of a shell, read off the parser. */
export async function completionEffect(plan: CompletionPlan, session: Session): Promise<ExitStatus> {
  const grammar = describeGrammar(createProgram(async () => undefined));
  session.output.result(completionScript(plan.shell, grammar));
  return EXIT_STATUS.yes;
}
