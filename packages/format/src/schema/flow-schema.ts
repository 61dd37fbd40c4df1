import { z } from 'zod';
import { finite, list, strict, text } from './fields.js';
import { matrixSchema } from './matrix-schema.js';
import { modelSummarySchema, toolSchema } from './sheet-schema.js';

const quantitySchema = z.enum(['entropy', 'production', 'distance']);

const pointSchema = strict({
  time: finite.nonnegative(),
  state: matrixSchema,
  /** Error of the state in trace norm. */
  stateError: finite.nonnegative(),
  /** D(ρ_t‖E†ρ), nats. */
  entropy: finite,
  /** I(ρ_t), a rate; null where it is infinite, at the boundary of state space. */
  production: finite.nullable(),
  /** ‖ρ_t − E†ρ‖₁. */
  distance: finite.nonnegative(),
  errors: strict({
    entropy: finite.nonnegative(),
    production: finite.nonnegative(),
    distance: finite.nonnegative(),
  }),
});

const boundSchema = strict({
  constant: z.enum(['gap', 'ge', 'cge', 'mlsi', 'clsi']),
  quantity: quantitySchema,
  /** r of e^{−rt}. */
  rate: finite.positive(),
  grade: z.enum(['exact', 'enclosed', 'certified']),
  by: text,
  /** The inequality. */
  formula: text,
  /** First time for which it holds. */
  from: finite.nonnegative(),
  prefactor: finite.nonnegative(),
  /** One value a point; null before `from`. */
  values: list(finite.nonnegative().nullable()),
});

/** Relative entropy along the flow of one state against what proved constants promise, `thalweg.flow/1`. */
export const flowSchema = strict({
  schema: z.literal('thalweg.flow/1'),
  model: modelSummarySchema,
  /** E†ρ, to which entropies refer; σ for a primitive model. */
  limit: matrixSchema,
  /** How states were propagated. Their error is bounded for eigenvectors and estimated otherwise. */
  method: z.enum(['eigenvectors', 'matrix exponential', 'Taylor steps']),
  points: list(pointSchema, 2),
  bounds: list(boundSchema),
  notes: list(text).optional(),
  tool: toolSchema,
});

export type FlowDocument = z.infer<typeof flowSchema>;
