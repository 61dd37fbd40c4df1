import { z } from 'zod';
import type { SpectrumDocument } from '../model/model-document.js';
import { finite, list, strict } from './fields.js';

const strength = finite.nonnegative();

/** The bath spectrum of a Davies generator. */
export const spectrumSchema: z.ZodType<SpectrumDocument> = z.discriminatedUnion('kind', [
  strict({ kind: z.literal('flat'), strength }),
  strict({ kind: z.literal('ohmic'), strength, cutoff: finite.positive().optional() }),
  strict({ kind: z.literal('metropolis'), strength }),
  strict({ kind: z.literal('table'), values: list(z.tuple([finite, strength]), 1) }),
]);
