import { z } from 'zod';
import { constantIdSchema, meanSchema } from '../schema/end-schema.js';
import { digest, list, strict, text } from '../schema/fields.js';
import { seedSchema, sheetSchema, toolSchema } from '../schema/sheet-schema.js';
import { fullPointSchema } from './showcase-schema.js';

/** What decides the results of a sweep, `thalweg.sweep/1`: the first line of the file that keeps its points. */
export const sweepSchema = strict({
  schema: z.literal('thalweg.sweep/1'),
  /** The example by its name; `generator` is the SHA-256 of `generate.js`. */
  example: strict({ name: text, version: text, generator: digest }),
  constants: list(strict({ id: constantIdSchema, mean: meanSchema.optional() }), 1),
  convention: text,
  seed: seedSchema,
  tool: toolSchema,
});

/** One point of a sweep, `thalweg.point/1`: its sheet without witnesses, or why there is none. */
export const pointSchema = strict({
  schema: z.literal('thalweg.point/1'),
  parameters: fullPointSchema,
  sheet: sheetSchema.nullable(),
  error: strict({ code: text, message: text }).optional(),
});

export type SweepDocument = z.infer<typeof sweepSchema>;
export type PointDocument = z.infer<typeof pointSchema>;
