import * as z from 'zod';
import { globalOptions } from '../global-options.js';
import { parseOptions } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type SealPlan = ReturnType<typeof planSeal>;

/** `seal EX [-o DIR]`. `output` is the current folder where not given. */
export function planSeal(raw: RawOptions, machine: Machine) {
  const schema = z.object({ ...globalOptions(machine), example: z.string(), output: z.string().default('.') });
  return parseOptions(schema, raw);
}
