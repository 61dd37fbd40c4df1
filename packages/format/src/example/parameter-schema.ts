import { z } from 'zod';
import { fault, type Fault } from '../fault.js';
import { EXAMPLE_LIMITS } from '../limits.js';
import { finite, strict, text, withoutFault } from '../schema/fields.js';

/** The name of a parameter: what stands before = in `--set n=3`, and a property of the generator's argument. */
const PARAMETER_NAME = /^[A-Za-z][A-Za-z0-9_]{0,31}$/;

const name = z.string().regex(PARAMETER_NAME, 'expected a name of 1 to 32 letters, digits and _, a letter first');

/** A short text on what the parameter is, with its unit where it has one. */
const meaning = text.min(1);

const wholeNumber = z.int();

const integerSchema = strict({
  name,
  type: z.literal('integer'),
  /** Smallest and largest value. */
  range: z.tuple([wholeNumber, wholeNumber]),
  default: wholeNumber,
  meaning,
});

const numberSchema = strict({
  name,
  type: z.literal('number'),
  range: z.tuple([finite, finite]),
  default: finite,
  meaning,
});

const word = z.string().regex(/^[A-Za-z0-9][\w.+-]{0,63}$/, 'expected a word of letters, digits and _ . + -');

const choiceSchema = strict({
  name,
  type: z.literal('choice'),
  choices: z.array(word).min(1).max(EXAMPLE_LIMITS.choices),
  default: word,
  meaning,
});

const booleanSchema = strict({ name, type: z.literal('boolean'), default: z.boolean(), meaning });

const anyParameter = z.discriminatedUnion('type', [integerSchema, numberSchema, choiceSchema, booleanSchema]);

export type Parameter = z.infer<typeof anyParameter>;

/** One parameter of an example: its type, its range, the value it has when nothing is said, and what it means. */
export const parameterSchema = withoutFault(anyParameter, findParameterFault);

function findParameterFault(parameter: Parameter): Fault | null {
  if (parameter.type === 'boolean') return null;
  if (parameter.type === 'choice') return findChoiceFault(parameter);
  const [least, most] = parameter.range;
  if (least > most) {
    return fault('wrong-schema', `expected [smallest, largest], got [${least}, ${most}]; exchange them`, ['range']);
  }
  if (parameter.default >= least && parameter.default <= most) return null;
  const message = `expected a default from ${least} to ${most}, got ${parameter.default}; correct it or the range`;
  return fault('wrong-schema', message, ['default']);
}

function findChoiceFault({ choices, default: chosen }: Parameter & { type: 'choice' }): Fault | null {
  const repeated = choices.findIndex((choice, k) => choices.indexOf(choice) < k);
  if (repeated >= 0) {
    const message = `expected each choice once, got ${JSON.stringify(choices[repeated])} again; remove one of them`;
    return fault('wrong-schema', message, ['choices', repeated]);
  }
  if (choices.includes(chosen)) return null;
  const message = `expected one of the choices ${choices.join(', ')}, got ${JSON.stringify(chosen)}; correct the default`;
  return fault('wrong-schema', message, ['default']);
}
