import { MEAN_NAMES, ThalwegError } from '@thalweg/core';
import * as z from 'zod';
import { globalOptions, modelOptions } from '../global-options.js';
import { readConstantList, readName, readSetting } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type SweepPlan = ReturnType<typeof planSweep>;

/** `sweep EX --over n=2:6 [--set …] [--only gap,cge] [-o FILE] [--csv] [--differences n]`. What is not given is null. */
export function planSweep(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    example: z.string(),
    over: z.array(textOption((text) => readSetting('--over', text))).default([]),
    set: modelOptions().set,
    only: textOption((text) => readConstantList('--only', text)).default([{ id: 'gap', mean: null }]),
    mean: textOption((text) => readName('--mean', text, MEAN_NAMES)).default('logarithmic'),
    output: z.string().nullable().default(null),
    csv: z.boolean().default(false),
    differences: z.string().nullable().default(null),
  });
  const plan = parseOptions(schema, raw);
  const { over, csv, json, differences } = plan;
  if (over.length === 0) throw usage('expected ranges of parameters, got none; add for example --over n=2:6');
  if (csv && json) throw usage('expected one of --csv and --json, got both; choose one');
  if (differences !== null && !over.some(({ name }) => name === differences)) {
    throw usage(`--differences: expected a parameter of --over, got "${differences}"; sweep over it`);
  }
  if (differences !== null && json) throw usage('expected no --differences beside --json, got both; leave one out');
  return plan;
}

function usage(message: string): ThalwegError {
  return new ThalwegError('usage', message);
}
