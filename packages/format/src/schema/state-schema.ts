import { z } from 'zod';
import type { MatrixDocument } from '../matrix/matrix-document.js';
import { strict } from './fields.js';
import { matrixSchema } from './matrix-schema.js';

export interface StateDocument {
  schema: 'thalweg.state/1';
  matrix: MatrixDocument;
}

/** A state with its schema named; a bare matrix is accepted in its place. */
export const stateSchema: z.ZodType<StateDocument> = strict({
  schema: z.literal('thalweg.state/1'),
  matrix: matrixSchema,
});
