import { ThalwegError } from '@thalweg/core';
import { describeValue } from '../describe-value.js';
import { fault, faultError, type Fault } from '../fault.js';
import type { Parameter } from './parameter-schema.js';

/** A value of a parameter. */
export type ParameterValue = number | string | boolean;

/** A value for every parameter of an example, in the order of its declarations. */
export type ParameterPoint = Record<string, ParameterValue>;

/**
 * The point with these values and the defaults of all other parameters. Throws `wrong-schema` with the pointer of the value (below
 * `base`) that does not fit its declaration or names no parameter.
 */
export function completePoint(
  parameters: readonly Parameter[],
  values: Readonly<Record<string, unknown>>,
  base = '',
): ParameterPoint {
  const found = findPointFault(parameters, values);
  if (found) throw faultError(found, base);
  const valueOf = (parameter: Parameter): ParameterValue =>
    Object.hasOwn(values, parameter.name) ? (values[parameter.name] as ParameterValue) : parameter.default;
  return Object.fromEntries(parameters.map((parameter) => [parameter.name, valueOf(parameter)]));
}

/** The first fault of values against the declarations, or null. Values may be left out. */
export function findPointFault(
  parameters: readonly Parameter[],
  values: Readonly<Record<string, unknown>>,
): Fault | null {
  for (const [name, value] of Object.entries(values)) {
    const parameter = parameters.find((declared) => declared.name === name);
    if (!parameter) return fault('wrong-schema', unknownName(parameters, name), [name]);
    const message = valueFault(parameter, value);
    if (message !== null) return fault('wrong-schema', message, [name]);
  }
  return null;
}

/**
 * The value that a text on the command line gives a parameter: `3`, `0.25`, `true`, a choice. Throws `usage` for a text that is
 * none, and for a value outside its range.
 */
export function readParameterValue(parameter: Parameter, text: string): ParameterValue {
  const value = valueOfText(parameter, text);
  const message = valueFault(parameter, value);
  if (message !== null) throw new ThalwegError('usage', message);
  return value;
}

/** What is said of a name that is not among the parameters. */
export function unknownName(parameters: readonly Parameter[], name: string): string {
  const known = parameters.map((parameter) => parameter.name).join(', ');
  const expected = known === '' ? 'no parameter, since the example has none' : `one of the parameters ${known}`;
  return `expected ${expected}, got ${JSON.stringify(name)}; correct the name`;
}

function valueOfText({ type }: Parameter, text: string): ParameterValue {
  const isNumber = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(text);
  if ((type === 'integer' || type === 'number') && isNumber) return Number(text);
  if (type === 'boolean' && (text === 'true' || text === 'false')) return text === 'true';
  return text;
}

function valueFault(parameter: Parameter, value: unknown): string | null {
  const { name, type } = parameter;
  if (type === 'boolean') {
    return typeof value === 'boolean'
      ? null
      : `expected true or false for ${name}, got ${describeValue(value)}; write one of them`;
  }
  if (type === 'choice') {
    if (typeof value === 'string' && parameter.choices.includes(value)) return null;
    return `expected one of ${parameter.choices.join(', ')} for ${name}, got ${describeValue(value)}; choose one`;
  }
  const [least, most] = parameter.range;
  const fits = typeof value === 'number' && (type === 'number' ? Number.isFinite(value) : Number.isInteger(value));
  if (fits && value >= least && value <= most) return null;
  const kind = type === 'integer' ? 'a whole number' : 'a number';
  return `expected ${kind} from ${least} to ${most} for ${name}, got ${describeValue(value)}; give a value in the range`;
}
