import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { keepToken } from '../../registry/credentials.js';
import { registryAddress } from '../../registry/registry-address.js';
import type { Session } from '../../session.js';
import type { SignOutPlan } from './plan.js';

/** Forgets the token kept for a registry. It stays valid until it expires or is revoked there. */
export async function signOutEffect(plan: SignOutPlan, session: Session): Promise<ExitStatus> {
  const { output, terminal } = session;
  const address = registryAddress(plan.registry, terminal.env);
  const path = await keepToken(address, null, terminal.env);
  if (output.json) output.document({ schema: 'thalweg.sign-out/1', registry: address });
  output.note(`${path} holds no token for ${address} any more. The token itself stays valid until it expires.`);
  return EXIT_STATUS.yes;
}
