import { z } from 'zod';
import { CERTIFICATE_GRADES, CERTIFIED_CONSTANTS } from '@thalweg/core';
import { CERTIFICATE_LIMITS } from '../limits.js';
import { blocksSchema } from './generator-forms.js';
import { digest, finite, list, oneOf, strict, text, whole } from './fields.js';
import { toolSchema } from './sheet-schema.js';

const rationalText = z
  .string()
  .max(CERTIFICATE_LIMITS.rationalLength, `expected at most ${CERTIFICATE_LIMITS.rationalLength} characters`)
  .regex(/^-?\d+(\/\d+)?$/, 'expected a rational number such as "-3/4"');

/** A double, which stands for its exact value, or a rational number as text. */
const scalar = oneOf('a number or a rational number such as "-3/4"', [finite, rationalText]);

const place = whole(0).max(CERTIFICATE_LIMITS.side);

const matrixEntries = longList(z.tuple([place, place, scalar, scalar]), CERTIFICATE_LIMITS.entries);

const jumpSchema = strict({
  label: text.optional(),
  matrix: matrixEntries,
  rate: scalar,
  ratio: scalar,
  partner: whole(0),
});

const index = z.int().min(-1);

/**
 * A lift that bounds a constant of one model from below, `thalweg.certificate/1`: the state, the jumps W of
 * L(A) = Σ rate (W*AW − ½{W*W, A}) with σWσ⁻¹ = W/ratio, and the terms [left, right, from, to, re, im] of
 * (L̂ζ)_to ∋ (re + i·im) W_left* ζ_from W_right, −1 for the identity; the terms −½(Sζ + ζS) are understood. Matrices are lists of
 * entries [row, column, re, im]; `frame` has the basis they are written in as its columns, where it is not that of the model. `solver` and `margins` record how it was found and are not part of the proof.
 */
export const certificateSchema = strict({
  schema: z.literal('thalweg.certificate/1'),
  model: digest,
  constant: z.enum(CERTIFIED_CONSTANTS),
  bound: scalar,
  grade: z.enum(CERTIFICATE_GRADES),
  algebra: blocksSchema,
  frame: matrixEntries.optional(),
  state: matrixEntries,
  jumps: list(jumpSchema, 1),
  lift: longList(z.tuple([index, index, whole(0), whole(0), scalar, scalar]), CERTIFICATE_LIMITS.terms),
  ansatz: text.optional(),
  basis: text.optional(),
  solver: strict({
    optimum: finite,
    iterations: whole(0),
    unknowns: whole(0),
    side: whole(0),
  }).optional(),
  margins: z.record(z.string().max(200), finite).optional(),
  tool: toolSchema.optional(),
});

export type CertificateDocument = z.infer<typeof certificateSchema>;

/** A list of at most `most` items; the length is checked before any item. */
function longList<T extends z.ZodType>(item: T, most: number): z.ZodType<z.output<T>[]> {
  const checked = z.array(z.unknown()).max(most);
  return checked.pipe(z.array(item) as unknown as z.ZodType<z.output<T>[], unknown[]>);
}
