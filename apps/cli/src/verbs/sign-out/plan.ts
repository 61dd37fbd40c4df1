import * as z from 'zod';
import { globalOptions, registryOptions } from '../global-options.js';
import { parseOptions } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type SignOutPlan = ReturnType<typeof planSignOut>;

/** `sign-out`. */
export function planSignOut(raw: RawOptions, machine: Machine) {
  const schema = z.object({ ...globalOptions(machine), ...registryOptions() });
  return parseOptions(schema, raw);
}
