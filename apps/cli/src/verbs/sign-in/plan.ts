import * as z from 'zod';
import { globalOptions, registryOptions } from '../global-options.js';
import { parseOptions } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type SignInPlan = ReturnType<typeof planSignIn>;

/** `sign-in`: the token comes by standard input, for a flag would show it to every user of the machine. */
export function planSignIn(raw: RawOptions, machine: Machine) {
  const schema = z.object({ ...globalOptions(machine), ...registryOptions() });
  return parseOptions(schema, raw);
}
