import type { Session } from '../session.js';
import { findToken } from './credentials.js';
import { registryAddress } from './registry-address.js';
import { createClient, type RegistryClient } from './registry-client.js';

/** The registry that a command line names, with the token kept for it. */
export async function openRegistry(option: string | null, { terminal }: Session): Promise<RegistryClient> {
  const address = registryAddress(option, terminal.env);
  return createClient(address, await findToken(address, terminal.env));
}
