import { z } from 'zod';
import { strict, list, oneOf } from '../schema/fields.js';
import { sheetSchema } from '../schema/sheet-schema.js';

/** A value for every parameter. */
export const fullPointSchema = z.record(
  z.string(),
  oneOf('a number, a text, true or false', [z.number(), z.string(), z.boolean()]),
);

/** The sheets of an example's showcase as they were computed once, `thalweg.showcase/1`: what `reproduce` compares with. */
export const showcaseSchema = strict({
  schema: z.literal('thalweg.showcase/1'),
  points: list(strict({ parameters: fullPointSchema, sheet: sheetSchema })),
});

export type ShowcaseDocument = z.infer<typeof showcaseSchema>;
