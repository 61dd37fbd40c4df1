import * as z from 'zod';
import { globalOptions, registryOptions } from '../global-options.js';
import { parseOptions } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type PublishPlan = ReturnType<typeof planPublish>;

/** `publish EX [--listed]`. */
export function planPublish(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    ...registryOptions(),
    example: z.string(),
    listed: z.boolean().default(false),
  });
  return parseOptions(schema, raw);
}
