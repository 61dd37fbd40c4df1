import { ThalwegError } from '@thalweg/core';
import { readParameterValue, type Parameter, type ParameterValue } from '@thalweg/format';

/** Points of one sweep. */
export const MOST_POINTS = 100_000;

/**
 * The values that a text such as `2:6`, `0.1:2:0.1` or `a,b` gives a parameter, in its order, each once. Steps are taken in decimals:
 * the third value of `0.1:2:0.1` is 0.3. Throws `usage`.
 */
export function expandRange(parameter: Parameter, text: string): ParameterValue[] {
  const values = text.split(',').flatMap((part) => expandPart(parameter, part.trim()));
  return [...new Set(values)];
}

function expandPart(parameter: Parameter, part: string): ParameterValue[] {
  const { type, name } = parameter;
  const bounds = part.split(':');
  if (bounds.length === 1 || type === 'choice' || type === 'boolean') return [readParameterValue(parameter, part)];
  if (bounds.length === 2 && type === 'number') {
    throw usage(`expected a step as well, such as ${name}=0.1:2:0.1, got "${part}"; add it`);
  }
  const [first = '', last = '', step = '1', ...rest] = bounds;
  if (rest.length > 0) throw usage(`expected first:last:step, got "${part}"; write for example ${name}=2:6`);
  return decimalSteps(first, last, step).map((text) => readParameterValue(parameter, text));
}

/** first, first + step, … up to and with last, as decimal texts. */
function decimalSteps(first: string, last: string, step: string): string[] {
  const parts = [first, last, step].map(readDecimal);
  const places = Math.max(...parts.map((part) => part.places));
  const [from = 0n, to = 0n, by = 0n] = parts.map(({ digits, places: own }) => digits * 10n ** BigInt(places - own));
  if (by === 0n) throw usage(`expected a step other than 0, got "${step}"; leave the range out for one value`);
  const steps = (to - from) / by;
  if (steps < 0n || (to - from) * by < 0n) {
    throw usage(`expected a range that its step leads through, got "${first}:${last}:${step}"; exchange the ends`);
  }
  if (steps >= BigInt(MOST_POINTS)) throw usage(`expected at most ${MOST_POINTS} values, got more; take a larger step`);
  return Array.from({ length: Number(steps) + 1 }, (_, k) => decimalText(from + BigInt(k) * by, places));
}

function readDecimal(text: string): { readonly digits: bigint; readonly places: number } {
  const match = /^([+-]?)(\d{1,15})(?:\.(\d{1,15}))?$/.exec(text.trim());
  if (!match) throw usage(`expected a decimal such as 0.1 in a range, got "${text}"; write it out`);
  const [, sign = '', whole = '', fraction = ''] = match;
  return { digits: BigInt(`${sign === '-' ? '-' : ''}${whole}${fraction}`), places: fraction.length };
}

function decimalText(digits: bigint, places: number): string {
  const size = (digits < 0n ? -digits : digits).toString().padStart(places + 1, '0');
  const sign = digits < 0n ? '-' : '';
  return places === 0 ? sign + size : `${sign}${size.slice(0, -places)}.${size.slice(-places)}`;
}

function usage(message: string): ThalwegError {
  return new ThalwegError('usage', message);
}
