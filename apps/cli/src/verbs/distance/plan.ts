import { ThalwegError } from '@thalweg/core';
import * as z from 'zod';
import { globalOptions, modelOptions } from '../global-options.js';
import { readPositive, readWholeNumber } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type DistancePlan = ReturnType<typeof planDistance>;

const USUAL_WIDTH = 1e-4;
const USUAL_POINTS = 9;
const MOST_POINTS = 1001;

/** `distance M a.json b.json [--width w] [--points n] [-o d.json]`; `output` is null where not given. */
export function planDistance(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    ...modelOptions(),
    from: z.string(),
    to: z.string(),
    width: textOption(readWidth).default(USUAL_WIDTH),
    points: textOption((text) => readWholeNumber('--points', text, 2, MOST_POINTS)).default(USUAL_POINTS),
    output: z.string().nullable().default(null),
  });
  return parseOptions(schema, raw);
}

function readWidth(text: string): number {
  const width = readPositive('--width', text);
  if (width < 1) return width;
  throw new ThalwegError('usage', `--width: expected a relative width below 1 such as 1e-4, got "${text}"`);
}
