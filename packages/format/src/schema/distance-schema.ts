import { z } from 'zod';
import { fault, type Fault } from '../fault.js';
import { bracketFields, endSchema } from './end-schema.js';
import { finite, list, strict, text, whole, withoutFault } from './fields.js';
import { matrixSchema } from './matrix-schema.js';
import { modelSummarySchema, toolSchema } from './sheet-schema.js';

const pointSchema = strict({
  /** From 0 to 1. */
  time: finite.nonnegative().max(1),
  state: matrixSchema,
  /** D(ρ_t‖E†ρ), nats. */
  entropy: finite,
  /** Length over time. */
  speed: finite.nonnegative(),
});

/** The transport distance of two states of one model, a length (root of a time), `thalweg.distance/1`. */
export const distanceSchema = withoutFault(
  strict({
    schema: z.literal('thalweg.distance/1'),
    model: modelSummarySchema,
    from: matrixSchema,
    to: matrixSchema,
    distance: strict({ lower: bracketFields.lower, upper: endSchema }),
    /** (upper − lower)/upper that was asked for. */
    relativeWidth: finite.positive().max(1),
    reached: z.boolean(),
    /** Null where the distance is infinite or zero. */
    geodesic: strict({
      /** Pieces of the discretised path. */
      pieces: whole(1),
      /** Over the pieces; both are the distance along a geodesic. */
      speed: strict({ least: finite.nonnegative(), most: finite.nonnegative() }),
      points: list(pointSchema, 2),
    }).nullable(),
    notes: list(text).optional(),
    tool: toolSchema,
  }),
  findOrderFault,
);

export type DistanceDocument = z.infer<typeof distanceSchema>;

function findOrderFault({
  distance: { lower, upper },
}: {
  distance: { lower: { value: number | null } | null; upper: { value: number | null } };
}): Fault | null {
  if (!lower || lower.value === null || upper.value === null || lower.value <= upper.value) return null;
  return fault(
    'wrong-schema',
    `expected a lower end below the upper one ${upper.value}, got ${lower.value}; correct one of them`,
    ['distance', 'lower', 'value'],
  );
}
