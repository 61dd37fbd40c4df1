import { ThalwegError } from '@thalweg/core';
import type { ExitStatus } from '../../exit-status.js';
import type { Session } from '../../session.js';
import type { CheckPlan } from './plan.js';

export async function checkEffect(_plan: CheckPlan, _session: Session): Promise<ExitStatus> {
  throw new ThalwegError('not-supported', 'check: this version does not compute it yet');
}
