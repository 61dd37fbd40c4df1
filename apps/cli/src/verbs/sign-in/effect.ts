import { ThalwegError } from '@thalweg/core';
import { memberSchema } from '@thalweg/format/api';
import { text as readAll } from 'node:stream/consumers';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { keepToken } from '../../registry/credentials.js';
import { registryAddress } from '../../registry/registry-address.js';
import { createClient } from '../../registry/registry-client.js';
import type { Session } from '../../session.js';
import type { SignInPlan } from './plan.js';

/** Reads a token from standard input, asks the registry whose it is, and keeps it. */
export async function signInEffect(plan: SignInPlan, session: Session): Promise<ExitStatus> {
  const { output, terminal } = session;
  const address = registryAddress(plan.registry, terminal.env);
  if (terminal.stdin.isTTY === true) output.note(`Paste a token of ${address}, then Enter and Ctrl-D:`);
  const token = (await readAll(terminal.stdin)).trim();
  if (!/^[\x21-\x7e]{8,200}$/.test(token)) {
    throw new ThalwegError(
      'usage',
      'expected a token on standard input, got something else: thalweg sign-in < token.txt',
    );
  }
  const member = await createClient(address, token).document(memberSchema, { path: '/api/v1/member' });
  const path = await keepToken(address, token, terminal.env);
  if (output.json) output.document(member);
  else output.result(`  ${member.name} at ${address}, scopes: ${member.scopes.join(', ')}\n`);
  output.note(`The token is kept in ${path}.`);
  return EXIT_STATUS.yes;
}
