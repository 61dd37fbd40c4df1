import { z } from 'zod';
import { fault, type Fault } from '../fault.js';
import { blocksSchema } from './generator-forms.js';
import { bracketFields, constantIdSchema, meanSchema } from './end-schema.js';
import { digest, finite, list, oneOf, strict, text, whole, withoutFault } from './fields.js';

export const symmetrySchema = z.enum(['tracial', 'gns', 'kms', 'none']);

export const toolSchema = strict({ name: text, version: text });

export const seedSchema = oneOf('a seed: a number or a text', [finite, text]);

/** What a result says of the model it belongs to; the model itself is named by its digest only. */
export const modelSummarySchema = strict({
  title: text.optional(),
  digest,
  dimension: whole(1),
  blocks: blocksSchema,
  symmetry: symmetrySchema,
  /** Null where it was not found out: no Markov semigroup, or an algebra too large for it. */
  primitive: z.boolean().nullable(),
});

export const constantSchema = withoutFault(
  strict({
    id: constantIdSchema,
    /** The operator mean; always given for `ge`. */
    mean: meanSchema.optional(),
    /** The ε of `mixing`, a trace distance. */
    epsilon: finite.positive().optional(),
    ...bracketFields,
    /** Both ends agree to the digits shown. */
    closed: z.boolean(),
    definition: text,
    note: text.optional(),
  }),
  findConstantFault,
);

/** The table of constants of one model, `thalweg.sheet/1`. */
export const sheetSchema = strict({
  schema: z.literal('thalweg.sheet/1'),
  model: modelSummarySchema,
  convention: text,
  constants: list(constantSchema),
  seed: seedSchema,
  tool: toolSchema,
});

export type ConstantDocument = z.infer<typeof constantSchema>;
export type SheetDocument = z.infer<typeof sheetSchema>;

function findConstantFault({
  id,
  mean,
  epsilon,
}: {
  id: string;
  mean?: string | undefined;
  epsilon?: number | undefined;
}): Fault | null {
  if (id === 'ge' && mean === undefined) {
    return fault(
      'wrong-schema',
      'expected the operator mean of "ge", got nothing; add the field "mean", for example "logarithmic"',
      ['mean'],
    );
  }
  if (id === 'mixing' && epsilon === undefined) {
    return fault('wrong-schema', 'expected the distance of "mixing", got nothing; add the field "epsilon"', [
      'epsilon',
    ]);
  }
  if (id !== 'mixing' && epsilon !== undefined) {
    return fault('wrong-schema', `expected no "epsilon" beside ${JSON.stringify(id)}, got ${epsilon}; remove it`, [
      'epsilon',
    ]);
  }
  return null;
}
