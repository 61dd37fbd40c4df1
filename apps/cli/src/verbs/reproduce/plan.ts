import { ThalwegError } from '@thalweg/core';
import * as z from 'zod';
import { globalOptions } from '../global-options.js';
import { readConstantList } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type ReproducePlan = ReturnType<typeof planReproduce>;

/** `reproduce EX [--record [--only gap,ge]]`. `only` is null for the full sheet; what is compared the record decides. */
export function planReproduce(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    example: z.string(),
    record: z.boolean().default(false),
    only: textOption((text) => readConstantList('--only', text))
      .nullable()
      .default(null),
  });
  const plan = parseOptions(schema, raw);
  if (plan.only !== null && !plan.record) {
    throw new ThalwegError(
      'usage',
      '--only: expected --record beside it, got none; what is compared the record decides',
    );
  }
  return plan;
}
