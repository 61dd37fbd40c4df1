import { ThalwegError } from '@thalweg/core';
import type { ExitStatus } from '../../exit-status.js';
import type { Session } from '../../session.js';
import type { WitnessPlan } from './plan.js';

export async function witnessEffect(_plan: WitnessPlan, _session: Session): Promise<ExitStatus> {
  throw new ThalwegError('not-supported', 'witness: this version does not compute it yet');
}
