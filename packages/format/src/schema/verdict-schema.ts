import { z } from 'zod';
import { bracketFields, constantIdSchema, meanSchema } from './end-schema.js';
import { digest, finite, list, strict, text } from './fields.js';
import { seedSchema, toolSchema } from './sheet-schema.js';

/** One claim, `constant` at least or at most `value`, with the bracket that decides it. */
const claimSchema = strict({
  constant: constantIdSchema,
  mean: meanSchema.optional(),
  relation: z.enum(['at-least', 'at-most']),
  value: finite,
  verdict: z.enum(['holds', 'refuted', 'undecided']),
  bracket: strict(bracketFields),
  note: text.optional(),
});

/** One step of checking a certificate: what was computed, what it had to stay below or above. */
const checkSchema = strict({
  name: text,
  holds: z.boolean(),
  value: finite.optional(),
  bound: finite.optional(),
  /** How the value must stand to the bound; at most, where left out. */
  relation: z.enum(['at-most', 'at-least']).optional(),
  note: text.optional(),
});

/** The answer of `check` (claims about a model) and of `verify` (a certificate), `thalweg.verdict/1`. */
export const verdictSchema = strict({
  schema: z.literal('thalweg.verdict/1'),
  verb: z.enum(['check', 'verify']),
  model: digest,
  certificate: digest.optional(),
  convention: text.optional(),
  claims: list(claimSchema, 1),
  checks: list(checkSchema).optional(),
  seed: seedSchema.optional(),
  tool: toolSchema,
});

export type VerdictDocument = z.infer<typeof verdictSchema>;
