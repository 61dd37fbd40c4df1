import { MEAN_NAMES, ThalwegError, type ConstantId } from '@thalweg/core';
import * as z from 'zod';
import { globalOptions, modelOptions } from '../global-options.js';
import { readConstant, readName } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type WitnessPlan = ReturnType<typeof planWitness>;

const WITNESSED: readonly ConstantId[] = ['ge', 'mlsi', 'clsi', 'lsi'];

/** `witness M ge [--at rho.json] [-o w.json]`. `at` and `output` are null where not given; `mean` is that of `ge`. */
export function planWitness(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    ...modelOptions(),
    constant: textOption((text) => readConstant('constant', text)),
    at: z.string().nullable().default(null),
    mean: textOption((text) => readName('--mean', text, MEAN_NAMES)).default('logarithmic'),
    output: z.string().nullable().default(null),
  });
  const { constant, mean, ...rest } = parseOptions(schema, raw);
  if (!WITNESSED.includes(constant.id)) {
    throw new ThalwegError(
      'usage',
      `constant: expected one that a state bounds from above (${WITNESSED.join(', ')}), got "${constant.id}"; thalweg constants gives it`,
    );
  }
  return { ...rest, constant: constant.id, mean: constant.mean ?? mean };
}
