import { ThalwegError } from '@thalweg/core';
import type { ExitStatus } from '../../exit-status.js';
import type { Session } from '../../session.js';
import type { ConstantsPlan } from './plan.js';

export async function constantsEffect(_plan: ConstantsPlan, _session: Session): Promise<ExitStatus> {
  throw new ThalwegError('not-supported', 'constants: this version does not compute it yet');
}
