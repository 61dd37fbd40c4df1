import { MEAN_NAMES, ThalwegError } from '@thalweg/core';
import * as z from 'zod';
import { globalOptions, modelOptions } from '../global-options.js';
import { readConstantList, readName, readSetting } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type SweepPlan = ReturnType<typeof planSweep>;

/** A plan to compute a sweep, as against one to work for others. */
export type ComputePlan = Extract<SweepPlan, { readonly work: false }>;

/**
 * `sweep EX --over n=2:6 [--set …] [--only gap,cge] [-o FILE] [--csv] [--differences n] [--queue URL]`; `sweep --work --queue URL`
 * works for others. What is not given is null.
 */
export function planSweep(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    example: z.string().nullable().default(null),
    over: z.array(textOption((text) => readSetting('--over', text))).default([]),
    set: modelOptions().set,
    only: textOption((text) => readConstantList('--only', text)).default([{ id: 'gap', mean: null }]),
    mean: textOption((text) => readName('--mean', text, MEAN_NAMES)).default('logarithmic'),
    output: z.string().nullable().default(null),
    csv: z.boolean().default(false),
    differences: z.string().nullable().default(null),
    queue: textOption(readQueue).nullable().default(null),
    work: z.boolean().default(false),
  });
  const plan = parseOptions(schema, raw);
  const { over, csv, json, differences, example, queue, work } = plan;
  if (work) return workPlan({ example, over, queue }, plan.threads);
  if (example === null) throw usage('expected an example, got none; name its folder or archive');
  if (over.length === 0) throw usage('expected ranges of parameters, got none; add for example --over n=2:6');
  if (csv && json) throw usage('expected one of --csv and --json, got both; choose one');
  if (differences !== null && !over.some(({ name }) => name === differences)) {
    throw usage(`--differences: expected a parameter of --over, got "${differences}"; sweep over it`);
  }
  if (differences !== null && json) throw usage('expected no --differences beside --json, got both; leave one out');
  return { ...plan, example, work: false as const };
}

/** What `--work` needs: a queue and nothing else. */
function workPlan(
  {
    example,
    over,
    queue,
  }: { readonly example: string | null; readonly over: readonly unknown[]; readonly queue: string | null },
  threads: number,
) {
  if (example !== null || over.length > 0) {
    throw usage('--work: expected no example and no --over, since the queue has them; leave them out');
  }
  if (queue === null) throw usage('--work: expected --queue with the URL of a PostgreSQL database, got none; add it');
  return { work: true as const, queue, threads };
}

/** A PostgreSQL URL without a password: command lines are seen by everybody on a machine. */
function readQueue(text: string): string {
  const url = URL.canParse(text) ? new URL(text) : null;
  if (url === null || !/^postgres(ql)?:$/.test(url.protocol)) {
    throw usage(`--queue: expected a URL such as postgres://user@host/database, got "${text}"`);
  }
  if (url.password === '') return text;
  throw usage('--queue: expected a URL without a password, got one with it; put it into PGPASSWORD or ~/.pgpass');
}

function usage(message: string): ThalwegError {
  return new ThalwegError('usage', message);
}
