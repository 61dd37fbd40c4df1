import * as z from 'zod';
import { globalOptions, modelOptions } from '../global-options.js';
import { parseOptions } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type ModelPlan = ReturnType<typeof planModel>;

/** `model EX [--set n=3] [-o m.json]`. `output` is null where not given. */
export function planModel(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    example: z.string(),
    set: modelOptions().set,
    output: z.string().nullable().default(null),
  });
  return parseOptions(schema, raw);
}
