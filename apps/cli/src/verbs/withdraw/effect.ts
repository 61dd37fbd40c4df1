import { ThalwegError } from '@thalweg/core';
import { versionSummarySchema } from '@thalweg/format/api';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readExampleName, versionPath } from '../../registry/example-name.js';
import { openRegistry } from '../../registry/open-registry.js';
import type { Session } from '../../session.js';
import type { WithdrawPlan } from './plan.js';

/** Takes a version of one's own out of what is browsed, for good and with a reason; it stays readable. */
export async function withdrawEffect(plan: WithdrawPlan, session: Session): Promise<ExitStatus> {
  const { output } = session;
  const { version, ...rest } = readExampleName(plan.name);
  if (version === null) {
    throw new ThalwegError('usage', `expected a version to withdraw, such as ${plan.name}@1.0.0, got none`);
  }
  if (plan.because === undefined) {
    throw new ThalwegError('usage', 'expected --because with the reason, which readers are shown, got none');
  }
  const client = await openRegistry(plan.registry, session);
  const withdrawn = await client.document(versionSummarySchema, {
    method: 'POST',
    path: `${versionPath({ ...rest, version })}/withdrawal`,
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify({ because: plan.because }),
  });
  if (output.json) output.document(withdrawn);
  else output.result(`  ${plan.name} is withdrawn: ${plan.because}\n`);
  return EXIT_STATUS.yes;
}
