import * as z from 'zod';
import { globalOptions, registryOptions } from '../global-options.js';
import { parseOptions } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type WithdrawPlan = ReturnType<typeof planWithdraw>;

/** `withdraw owner/slug@version --because TEXT`. */
export function planWithdraw(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    ...registryOptions(),
    name: z.string(),
    because: z.string().optional(),
  });
  return parseOptions(schema, raw);
}
