import { z } from 'zod';
import { CONSTANT_IDS, MEAN_NAMES } from '@thalweg/core';
import { fault, type Fault } from '../fault.js';
import { digest, finite, oneOf, strict, text, whole, withoutFault } from './fields.js';
import { matrixSchema } from './matrix-schema.js';

export const constantIdSchema = z.enum(CONSTANT_IDS);

export const meanSchema = z.enum(MEAN_NAMES);

/** What an inequality was evaluated at; `observable` is null where the state alone decides, `amplification` is the k of L⊗id_k. */
export const witnessFields = {
  constant: constantIdSchema,
  mean: meanSchema.optional(),
  value: finite,
  state: matrixSchema,
  observable: matrixSchema.nullable(),
  amplification: whole(1),
};

/**
 * One end of a bracket, units of the constant. JSON has no infinities: an unbounded end has the value null, `by` "unbounded",
 * and a note that says why. `unbounded` tells +∞ ("above") from −∞ ("below"); see `endValue` for where it is left out.
 */
export const endSchema = withoutFault(
  strict({
    value: finite.nullable(),
    grade: z.enum(['exact', 'enclosed', 'certified', 'observed']),
    by: text,
    margin: finite.nonnegative().optional(),
    evidence: oneOf('a witness or {"certificate": digest}', [
      strict(witnessFields),
      strict({ certificate: digest }),
    ]).optional(),
    unbounded: z.enum(['above', 'below']).optional(),
    note: text.optional(),
  }),
  findEndFault,
);

export type EndDocument = z.infer<typeof endSchema>;

type EndFields = Readonly<{
  value: number | null;
  by: string;
  note?: string | undefined;
  unbounded?: string | undefined;
}>;

/** Lower and upper end of one constant; null where nothing is known. An observed value is never a lower bound. */
export const bracketFields = {
  lower: withoutFault(endSchema.nullable(), findLowerFault),
  upper: endSchema.nullable(),
};

function findEndFault({ value, by, note, unbounded }: EndFields): Fault | null {
  if (value === null && by !== 'unbounded') {
    return fault(
      'wrong-schema',
      `expected "by" to be "unbounded" where the value is null, got ${JSON.stringify(by)}; give the value or the reason`,
      ['by'],
    );
  }
  if (value !== null && by === 'unbounded') {
    return fault(
      'wrong-schema',
      `expected null as the value of an unbounded end, got ${value}; correct "by" or the value`,
      ['value'],
    );
  }
  if (value !== null && unbounded !== undefined) {
    return fault('wrong-schema', `expected no "unbounded" beside the value ${value}, got "${unbounded}"; remove it`, [
      'unbounded',
    ]);
  }
  if (value === null && note === undefined) {
    return fault(
      'wrong-schema',
      'expected a note that says why the end is unbounded, got nothing; add the field "note"',
      ['note'],
    );
  }
  return null;
}

function findLowerFault(end: EndDocument | null): Fault | null {
  if (end?.grade !== 'observed') return null;
  return fault(
    'wrong-schema',
    'expected a proved lower end (exact, enclosed or certified), got an observed one; a search proves no bound from below',
    ['grade'],
  );
}
