import { z } from 'zod';
import { bracketFields, constantIdSchema, endSchema, meanSchema } from '../schema/end-schema.js';
import { digest, list, strict, text } from '../schema/fields.js';
import { toolSchema } from '../schema/sheet-schema.js';
import { claimFields } from './claims-schema.js';
import { fullPointSchema } from './showcase-schema.js';

/**
 * How an end of a bracket stands to the recorded one: `contradicts` where the new bracket and the recorded one have no common
 * value, else in which way it differs.
 */
const END_CHANGES = ['contradicts', 'tighter', 'looser', 'weaker-grade', 'stronger-grade'] as const;

const endDifferenceSchema = strict({
  constant: constantIdSchema,
  mean: meanSchema.optional(),
  end: z.enum(['lower', 'upper']),
  change: z.enum(END_CHANGES),
  recorded: endSchema.nullable(),
  found: endSchema.nullable(),
});

/**
 * A claim is `proved` by the ends of its bracket, `refuted` by one of them, `supported` where a search for a counterexample found
 * none but no end proves it, `open` otherwise; a `limit` is decided at no single point.
 */
const CLAIM_STATES = ['proved', 'supported', 'open', 'refuted', 'limit'] as const;

const decidedClaimSchema = strict({ ...claimFields, state: z.enum(CLAIM_STATES), bracket: strict(bracketFields) });

const pointSchema = strict({
  parameters: fullPointSchema,
  model: digest,
  /** The recorded digest; null where the record has no such point. */
  recordedModel: digest.nullable(),
  differences: list(endDifferenceSchema),
  claims: list(decidedClaimSchema),
});

/** What `reproduce` found, `thalweg.reproduction/1`. */
export const reproductionSchema = strict({
  schema: z.literal('thalweg.reproduction/1'),
  example: strict({ name: text, version: text }),
  verdict: z.enum(['same', 'differs', 'undecided']),
  points: list(pointSchema),
  tool: toolSchema,
});

export type ReproductionDocument = z.infer<typeof reproductionSchema>;
