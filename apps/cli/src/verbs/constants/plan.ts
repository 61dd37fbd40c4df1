import { MEAN_NAMES } from '@thalweg/core';
import * as z from 'zod';
import { fileOption, globalOptions, modelOptions } from '../global-options.js';
import { readConstantList, readName } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type ConstantsPlan = ReturnType<typeof planConstants>;

/** `constants M [--only gap,ge:left] [--mean left] [--svg FILE] [--verbose]`. `only` is null for the whole sheet, `svg` where not given. */
export function planConstants(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    ...modelOptions(),
    only: textOption((text) => readConstantList('--only', text))
      .nullable()
      .default(null),
    mean: textOption((text) => readName('--mean', text, MEAN_NAMES)).default('logarithmic'),
    svg: fileOption(),
    verbose: z.boolean().default(false),
  });
  return parseOptions(schema, raw);
}
