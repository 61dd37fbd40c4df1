import { z } from 'zod';
import { INEQUALITY_NAMES, NOTIONS } from '@thalweg/core';
import { bracketFields } from './end-schema.js';
import { finite, list, strict, text, whole } from './fields.js';
import { matrixSchema } from './matrix-schema.js';
import { modelSummarySchema, seedSchema, toolSchema } from './sheet-schema.js';

/** The lowest value that was seen of one notion of curvature, a rate: observed, so no bound from below. */
const notionSchema = strict({
  notion: z.enum(NOTIONS),
  value: finite,
  /** Estimated error: discretisation, length of the geodesic, rounding. */
  error: finite.nonnegative(),
  /** Value at least the proved lower end, up to the error; null where none is proved. */
  aboveProved: z.boolean().nullable(),
  /** The state where it was seen. */
  state: matrixSchema,
  /** gradient: the observable; evi: the reference state; convexity: the other end of the geodesic. */
  against: matrixSchema,
  /** convexity: the end of the geodesic at time 1, of which `against` is the one at time 0. */
  from: matrixSchema.optional(),
  /** evi: time along the trajectory; convexity: time along the geodesic, from 0 to 1. */
  time: finite.nonnegative().optional(),
});

/** An inequality on the pair of states where its slack, relative to the right side, is least. */
const inequalitySchema = strict({
  name: z.enum(INEQUALITY_NAMES),
  formula: text,
  /** The constant used and how it is known. */
  constant: finite,
  by: text,
  pairs: whole(1),
  /** Right side minus left side. */
  slack: finite,
  /** Half the width that the brackets of distances leave. */
  error: finite.nonnegative(),
  relative: finite,
  status: z.enum(['holds', 'undecided', 'violated']),
  state: matrixSchema,
  against: matrixSchema,
});

/** Three notions of curvature side by side on one model, and what its constants promise of distances, `thalweg.comparison/1`. */
export const comparisonSchema = strict({
  schema: z.literal('thalweg.comparison/1'),
  model: modelSummarySchema,
  /** The bracket of `ge`. */
  curvature: strict(bracketFields),
  notions: list(notionSchema, 1),
  /** All notions agree within their errors. */
  agree: z.boolean(),
  inequalities: list(inequalitySchema),
  /** Random pairs of states, beside the short geodesics through the witness. */
  pairs: whole(0),
  notes: list(text).optional(),
  seed: seedSchema,
  tool: toolSchema,
});

export type ComparisonDocument = z.infer<typeof comparisonSchema>;
