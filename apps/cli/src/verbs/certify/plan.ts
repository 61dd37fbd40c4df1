import { CERTIFIED_CONSTANTS } from '@thalweg/core';
import * as z from 'zod';
import { globalOptions, modelOptions } from '../global-options.js';
import { readName } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type CertifyPlan = ReturnType<typeof planCertify>;

/** `certify M cge [-o c.json] [--verbose]`. `output` is null where not given. */
export function planCertify(raw: RawOptions, machine: Machine) {
  const schema = z.object({
    ...globalOptions(machine),
    ...modelOptions(),
    constant: textOption((text) => readName('constant', text, CERTIFIED_CONSTANTS)),
    output: z.string().nullable().default(null),
    verbose: z.boolean().default(false),
  });
  return parseOptions(schema, raw);
}
