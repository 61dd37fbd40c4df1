import { MEAN_NAMES, ThalwegError } from '@thalweg/core';
import * as z from 'zod';
import { globalOptions, modelOptions } from '../global-options.js';
import { readClaim, readName } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type CheckPlan = ReturnType<typeof planCheck>;

/** `check M --at-least cge=0.5 --at-most mlsi=1`; both options repeat. Claims stand in the order: at least, at most. */
export function planCheck(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    ...modelOptions(),
    atLeast: z.array(textOption((text) => readClaim('at-least', text))).default([]),
    atMost: z.array(textOption((text) => readClaim('at-most', text))).default([]),
    mean: textOption((text) => readName('--mean', text, MEAN_NAMES)).default('logarithmic'),
  });
  const { atLeast, atMost, ...rest } = parseOptions(schema, raw);
  const claims = [...atLeast, ...atMost];
  if (claims.length === 0) {
    throw new ThalwegError(
      'usage',
      'check: expected at least one claim, got none; add --at-least cge=0.5 or --at-most mlsi=1',
    );
  }
  return { ...rest, claims };
}
