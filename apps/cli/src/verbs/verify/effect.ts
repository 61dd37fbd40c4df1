import { ThalwegError } from '@thalweg/core';
import type { ExitStatus } from '../../exit-status.js';
import type { Session } from '../../session.js';
import type { VerifyPlan } from './plan.js';

export async function verifyEffect(_plan: VerifyPlan, _session: Session): Promise<ExitStatus> {
  throw new ThalwegError('not-supported', 'verify: this version does not compute it yet');
}
