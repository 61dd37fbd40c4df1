import { z } from 'zod';
import { meanSchema } from './end-schema.js';
import { finite, list, strict, text, whole } from './fields.js';
import { matrixSchema } from './matrix-schema.js';
import { modelSummarySchema, toolSchema } from './sheet-schema.js';

const pointSchema = strict({ x: finite, y: finite });

/** κ over a slice of state space, `thalweg.relief/1`. */
export const reliefSchema = strict({
  schema: z.literal('thalweg.relief/1'),
  model: modelSummarySchema,
  mean: meanSchema,
  /** ρ(x,y) = origin + x·horizontal + y·vertical. */
  slice: strict({
    kind: z.enum(['bloch disc', 'triangle', 'plane']),
    axes: z.tuple([text, text]),
    origin: matrixSchema,
    horizontal: matrixSchema,
    vertical: matrixSchema,
    /** Corners of a triangle, states that a plane was laid through. */
    marks: list(strict({ name: text, x: finite, y: finite })),
  }),
  /** Point j of ring i at index i·rays + j; ring 0 is one point. κ is null where it is not defined or not resolved. */
  grid: strict({
    rings: whole(2),
    rays: whole(3),
    x: list(finite),
    y: list(finite),
    kappa: list(finite.nullable()),
    /** The boundary of state space, a closed polygon. */
    rimX: list(finite),
    rimY: list(finite),
  }),
  /** The lowest value met, evaluated afresh, with a bound on its floating-point error: observed, an upper end of `ge`. */
  lowest: strict({
    x: finite,
    y: finite,
    kappa: finite,
    margin: finite.nonnegative(),
    /** κ still falls towards the boundary of state space. */
    atRim: z.boolean(),
    state: matrixSchema,
  }).nullable(),
  /** The reference state, where it lies in the slice. */
  reference: pointSchema.nullable(),
  tool: toolSchema,
});

export type ReliefDocument = z.infer<typeof reliefSchema>;
