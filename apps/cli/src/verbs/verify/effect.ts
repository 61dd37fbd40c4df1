import { ThalwegError } from '@thalweg/core';
import { parseWitness } from '@thalweg/format';
import { only } from '../../compute/only.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readSource } from '../../input/read-source.js';
import { renderVerdict } from '../../render/render-verdict.js';
import type { Session } from '../../session.js';
import type { VerifyPlan } from './plan.js';

/** Evaluates a witness afresh on its model. Ends with `no` when it does not show what it states. */
export async function verifyEffect(plan: VerifyPlan, session: Session): Promise<ExitStatus> {
  const { stdin } = session.terminal;
  const document = parseWitness((await readSource(plan.evidence, stdin)).bytes);
  if (plan.model === null) {
    throw new ThalwegError(
      'usage',
      `expected --model with the file of the model whose digest is ${document.model}, got none; a witness names its model by digest only`,
    );
  }
  const source = await readSource(plan.model, stdin);
  const verdict = await session.compute(plan, async (pool) =>
    only(await pool.run('witness-check', [{ source, document }])),
  );
  const { output } = session;
  if (output.json) output.document(verdict);
  else output.result(renderVerdict(verdict, output));
  return verdict.claims.every(({ verdict: answer }) => answer === 'holds') ? EXIT_STATUS.yes : EXIT_STATUS.no;
}
