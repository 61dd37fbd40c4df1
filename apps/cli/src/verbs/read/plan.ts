import * as z from 'zod';
import { globalOptions, registryOptions } from '../global-options.js';
import { parseOptions } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type ReadPlan = ReturnType<typeof planRead>;

/** `read owner/slug[@version]`. */
export function planRead(raw: RawOptions, machine: Machine) {
  const schema = z.object({ ...globalOptions(machine), ...registryOptions(), name: z.string() });
  return parseOptions(schema, raw);
}
