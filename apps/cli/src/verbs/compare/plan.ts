import * as z from 'zod';
import { globalOptions, modelOptions } from '../global-options.js';
import { readWholeNumber } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type ComparePlan = ReturnType<typeof planCompare>;

const USUAL_PAIRS = 8;
const MOST_PAIRS = 1000;

/** `compare M [--pairs n] [-o c.json]`; `output` is null where not given. */
export function planCompare(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    ...modelOptions(),
    pairs: textOption((text) => readWholeNumber('--pairs', text, 1, MOST_PAIRS)).default(USUAL_PAIRS),
    output: z.string().nullable().default(null),
  });
  return parseOptions(schema, raw);
}
