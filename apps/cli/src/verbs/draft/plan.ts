import * as z from 'zod';
import { globalOptions } from '../global-options.js';
import { parseOptions } from '../parse-options.js';
import type { Machine, RawOptions } from '../verb.js';

export type DraftPlan = ReturnType<typeof planDraft>;

/** `draft DIR [--from M] [--name …] [--title …] …`. What is not given is null, and asked for. */
export function planDraft(raw: RawOptions, machine: Machine) {
  const text = z.string().nullable().default(null);
  const schema = z.object({
    ...globalOptions(machine),
    folder: z.string(),
    from: text,
    name: text,
    title: text,
    summary: text,
    author: text,
    orcid: text,
    affiliation: text,
    licence: text,
  });
  return parseOptions(schema, raw);
}
