import { z } from 'zod';
import { fault, type Fault } from '../fault.js';
import type { JsonValue } from '../json/json-value.js';
import type { MatrixDocument } from '../matrix/matrix-document.js';
import type { GeneratorForm, Model, ModelDocument, Provenance } from '../model/model-document.js';
import { finite, list, strict, text, withoutFault } from './fields.js';
import {
  balancedSchema,
  blocksSchema,
  daviesSchema,
  expectationSchema,
  lengthSchema,
  lindbladSchema,
  ratesSchema,
  schurSchema,
  superoperatorSchema,
} from './generator-forms.js';
import { matrixSchema } from './matrix-schema.js';

const provenanceSchema: z.ZodType<Provenance> = strict({
  example: text.optional(),
  parameters: z.record(z.string(), z.json() as z.ZodType<JsonValue>).optional(),
  source: text.optional(),
  tool: strict({ name: text, version: text }).optional(),
  note: text.optional(),
});

/** A generator in any of its forms; `sum` holds generators, `tensor` holds models. */
const generatorSchema: z.ZodType<GeneratorForm<MatrixDocument>> = z.discriminatedUnion('form', [
  lindbladSchema,
  balancedSchema,
  ratesSchema,
  expectationSchema,
  lengthSchema,
  schurSchema,
  daviesSchema,
  superoperatorSchema,
  strict({
    form: z.literal('sum'),
    get terms(): z.ZodType<{ weight: number; generator: GeneratorForm<MatrixDocument> }[]> {
      return list(strict({ weight: finite, generator: generatorSchema }), 1);
    },
  }),
  strict({
    form: z.literal('tensor'),
    get factors(): z.ZodType<Model<MatrixDocument>[]> {
      return list(factorSchema, 1);
    },
  }),
]);

const fields = {
  title: text.optional(),
  algebra: blocksSchema.optional(),
  generator: generatorSchema,
  state: matrixSchema.optional(),
  provenance: provenanceSchema.optional(),
};

const factorSchema: z.ZodType<Model<MatrixDocument>> = withoutFault(
  strict({ schema: z.literal('thalweg.model/1').optional(), ...fields }),
  findAlgebraFault,
);

/** A model document, `thalweg.model/1`. */
export const modelSchema: z.ZodType<ModelDocument> = withoutFault(
  strict({ schema: z.literal('thalweg.model/1'), ...fields }),
  findAlgebraFault,
);

/** Forms that determine the blocks of their algebra. */
const WITHOUT_ALGEBRA = new Set(['length', 'rates', 'schur', 'tensor']);

function findAlgebraFault({ algebra, generator }: Model<MatrixDocument>): Fault | null {
  if (algebra || WITHOUT_ALGEBRA.has(generator.form)) return null;
  const message = `expected "algebra", the block sizes, beside a generator of the form "${generator.form}", got nothing; write for example [2] for a qubit`;
  return fault('wrong-schema', message, ['algebra']);
}
