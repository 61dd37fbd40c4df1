import * as z from 'zod';
import { globalOptions, modelOptions } from '../global-options.js';
import { parseOptions } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type VerifyPlan = ReturnType<typeof planVerify>;

/** `verify w.json [--model M [--set n=3]]`. `model` is null where not given. */
export function planVerify(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    evidence: z.string(),
    set: modelOptions().set,
    model: z.string().nullable().default(null),
  });
  return parseOptions(schema, raw);
}
