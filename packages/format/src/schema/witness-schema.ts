import { z } from 'zod';
import { witnessFields } from './end-schema.js';
import { digest, strict } from './fields.js';
import { toolSchema } from './sheet-schema.js';

/** A state and an observable that bound a constant from above, `thalweg.witness/1`; the model is named by its digest. */
export const witnessSchema = strict({
  schema: z.literal('thalweg.witness/1'),
  model: digest,
  ...witnessFields,
  tool: toolSchema.optional(),
});

export type WitnessDocument = z.infer<typeof witnessSchema>;
