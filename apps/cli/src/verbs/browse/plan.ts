import * as z from 'zod';
import { globalOptions, registryOptions } from '../global-options.js';
import { readWholeNumber } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type BrowsePlan = ReturnType<typeof planBrowse>;

const MOST = 100;
const DEFAULT_COUNT = 20;

/** `browse [WORDS…] [--owner NAME] [--count N]`. */
export function planBrowse(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    ...registryOptions(),
    words: z.string().nullable().default(null),
    owner: z.string().nullable().default(null),
    cursor: z.string().nullable().default(null),
    count: textOption((text) => readWholeNumber('--count', text, 1, MOST)).default(DEFAULT_COUNT),
  });
  return parseOptions(schema, raw);
}
