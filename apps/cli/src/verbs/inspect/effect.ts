import { ThalwegError } from '@thalweg/core';
import type { ExitStatus } from '../../exit-status.js';
import type { Session } from '../../session.js';
import type { InspectPlan } from './plan.js';

export async function inspectEffect(_plan: InspectPlan, _session: Session): Promise<ExitStatus> {
  throw new ThalwegError('not-supported', 'inspect: this version does not compute it yet');
}
