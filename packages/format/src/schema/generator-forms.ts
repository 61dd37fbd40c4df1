import { z } from 'zod';
import { fault, type Fault } from '../fault.js';
import type { GroupDocument, LengthForm } from '../model/model-document.js';
import { finite, list, oneOf, strict, text, whole, withoutFault } from './fields.js';
import { matrixSchema, rowsSchema } from './matrix-schema.js';
import { spectrumSchema } from './spectrum-schema.js';

export const blocksSchema = list(whole(1), 1);

export const lindbladSchema = strict({
  form: z.literal('lindblad'),
  hamiltonian: matrixSchema.optional(),
  jumps: list(strict({ label: text.optional(), rate: finite.optional(), matrix: matrixSchema })),
});

export const balancedSchema = strict({
  form: z.literal('balanced'),
  state: matrixSchema,
  terms: list(strict({ label: text.optional(), matrix: matrixSchema, frequency: finite })),
});

export const ratesSchema = strict({ form: z.literal('rates'), rates: rowsSchema });

export const expectationSchema = strict({
  form: z.literal('expectation'),
  onto: oneOf('{"scalars": true}, {"diagonal": true}, {"blocks": [...]} or {"spannedBy": [...]}', [
    strict({ scalars: z.literal(true) }),
    strict({ diagonal: z.literal(true) }),
    strict({ blocks: blocksSchema }),
    strict({ spannedBy: list(matrixSchema, 1) }),
  ]),
  rate: finite.optional(),
});

const groupSchema: z.ZodType<GroupDocument> = oneOf(
  'a group: {"cyclic": n}, {"dihedral": n}, {"symmetric": n} or {"table": rows}',
  [
    strict({ cyclic: whole(1) }),
    strict({ dihedral: whole(1) }),
    strict({ symmetric: whole(1) }),
    strict({ table: rowsSchema }),
  ],
);

export const lengthSchema = withoutFault(
  strict({
    form: z.literal('length'),
    group: groupSchema,
    length: oneOf('a length for each element as a list of numbers, or "word"', [list(finite, 1), z.literal('word')]),
  }),
  findLengthFault,
);

export const schurSchema = strict({ form: z.literal('schur'), points: rowsSchema });

export const daviesSchema = strict({
  form: z.literal('davies'),
  hamiltonian: matrixSchema,
  couplings: list(matrixSchema, 1),
  beta: finite,
  spectrum: spectrumSchema,
});

export const superoperatorSchema = strict({
  form: z.literal('superoperator'),
  matrix: matrixSchema,
  picture: z.enum(['heisenberg', 'schrodinger']),
  stacking: z.enum(['rows', 'columns']),
});

function findLengthFault({ group, length }: LengthForm): Fault | null {
  if (length !== 'word' || !('table' in group)) return null;
  const message =
    'expected a list of lengths, one for each element, got "word" for a group given by its table, which names no generators; write the list';
  return fault('wrong-schema', message, ['length']);
}
