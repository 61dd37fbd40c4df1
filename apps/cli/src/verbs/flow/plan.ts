import { ThalwegError } from '@thalweg/core';
import * as z from 'zod';
import { fileOption, globalOptions, modelOptions } from '../global-options.js';
import { readPositive, readWholeNumber } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type FlowPlan = ReturnType<typeof planFlow>;

const MOST_POINTS = 10_000;

/** `flow M --from rho.json [--until t] [--points n] [--csv] [--svg FILE]`. What is not given is null. */
export function planFlow(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    ...modelOptions(),
    from: z.string({ error: '--from: expected a state to start from, got none; give --from rho.json' }),
    until: textOption((text) => readPositive('--until', text))
      .nullable()
      .default(null),
    points: textOption((text) => readWholeNumber('--points', text, 2, MOST_POINTS))
      .nullable()
      .default(null),
    csv: z.boolean().default(false),
    svg: fileOption(),
  });
  const plan = parseOptions(schema, raw);
  if (plan.csv && plan.json) {
    throw new ThalwegError('usage', 'expected one of --csv and --json, got both; choose one');
  }
  return plan;
}
