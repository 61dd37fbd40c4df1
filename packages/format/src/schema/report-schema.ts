import { z } from 'zod';
import { finite, list, oneOf, strict, text, whole } from './fields.js';
import { matrixSchema } from './matrix-schema.js';
import { modelSummarySchema, symmetrySchema, toolSchema } from './sheet-schema.js';

const checkSchema = strict({ holds: z.boolean(), residual: finite.nonnegative() });

/** A complex number. */
const complexSchema = z.tuple([finite, finite]);

/** What `inspect` finds, `thalweg.report/1`. Parts that a model does not have (no faithful state, no canonical form) are null. */
export const reportSchema = strict({
  schema: z.literal('thalweg.report/1'),
  model: modelSummarySchema,
  markov: strict({
    hermitian: checkSchema,
    unital: checkSchema,
    /** By form: it follows from jumps with rates of at least 0, and no eigenvalue was computed. */
    completelyPositive: strict({ holds: z.boolean(), smallestEigenvalue: finite, byForm: z.boolean().optional() }),
  }),
  symmetry: strict({ kind: symmetrySchema, residuals: z.record(z.string(), finite.nonnegative()) }),
  state: matrixSchema.nullable(),
  /** Blocks are empty when the fixed points are no algebra. */
  fixedPoints: strict({ dimension: whole(1), blocks: list(whole(1)) }).nullable(),
  primitive: z.boolean().nullable(),
  /** The canonical form; null without GNS symmetry. */
  jumps: list(
    strict({ label: text.optional(), frequency: finite, norm: finite.nonnegative(), matrix: matrixSchema.optional() }),
  ).nullable(),
  /** ‖L − L rebuilt from the jumps‖/‖L‖. */
  canonicalResidual: finite.nonnegative().optional(),
  /** Eigenvalues of −L, [re, im] where they are not real. */
  spectrum: list(oneOf('a number or [re, im]', [finite, complexSchema])).nullable(),
  notes: list(text).optional(),
  tool: toolSchema,
});

export type ReportDocument = z.infer<typeof reportSchema>;
