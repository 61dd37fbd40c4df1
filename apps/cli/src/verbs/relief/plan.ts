import { BLOCH_AXES, MEAN_NAMES, ThalwegError, type BlochAxis } from '@thalweg/core';
import * as z from 'zod';
import { fileOption, globalOptions, modelOptions } from '../global-options.js';
import { readName, readWholeNumber } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type ReliefPlan = ReturnType<typeof planRelief>;

const FEWEST_POINTS = 100;
const MOST_POINTS = 40_000;
const MOST_STATES = 2;

/**
 * `relief M [-o FILE] [--axes x,z] [--through a.json]… [--points n] [--mean left] [--table | --csv]`. What is not given is null;
 * `through` names at most two states.
 */
export function planRelief(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    ...modelOptions(),
    axes: textOption(readAxes).nullable().default(null),
    through: z.array(z.string()).default([]),
    points: textOption((text) => readWholeNumber('--points', text, FEWEST_POINTS, MOST_POINTS))
      .nullable()
      .default(null),
    mean: textOption((text) => readName('--mean', text, MEAN_NAMES)).default('logarithmic'),
    output: fileOption(),
    table: z.boolean().default(false),
    csv: z.boolean().default(false),
  });
  const plan = parseOptions(schema, raw);
  const forms = [plan.json && '--json', plan.table && '--table', plan.csv && '--csv'].filter((form) => form !== false);
  if (forms.length > 1)
    throw new ThalwegError('usage', `expected one form of output, got ${forms.join(' and ')}; choose one`);
  if (plan.through.length > MOST_STATES) {
    throw new ThalwegError(
      'usage',
      `--through: expected at most two states, got ${plan.through.length}; a plane needs no more`,
    );
  }
  if (plan.axes !== null && plan.through.length > 0) {
    throw new ThalwegError('usage', 'expected --axes or --through, got both; choose one way to lay the slice');
  }
  return plan;
}

/** `x,z`: two different ones. */
function readAxes(text: string): readonly [BlochAxis, BlochAxis] {
  const [first, second, ...rest] = text.split(',').map((part) => readName('--axes', part.trim(), BLOCH_AXES));
  if (first === undefined || second === undefined || rest.length > 0 || first === second) {
    throw new ThalwegError('usage', `--axes: expected two different axes such as x,z, got "${text}"`);
  }
  return [first, second];
}
