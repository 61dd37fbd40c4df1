import { CONSTANT_IDS, MEAN_NAMES, ThalwegError, type ConstantId, type MeanName } from '@thalweg/core';
import { suggest } from '../suggest.js';

const SECONDS_PER_UNIT: Readonly<Record<string, number>> = { '': 1, s: 1, m: 60, min: 60, h: 3600 };
const LONGEST_SECONDS = 1_000_000;

/** One constant as written on the command line: `cge`, or `ge:left` for another operator mean. */
export interface ConstantName {
  readonly id: ConstantId;
  /** Null where none was given. */
  readonly mean: MeanName | null;
}

/** A claim of `check`. */
export interface Claim {
  readonly constant: ConstantName;
  readonly relation: 'at-least' | 'at-most';
  readonly bound: number;
}

/** A parameter of an example and the text that gives it a value. */
export interface Setting {
  readonly name: string;
  readonly text: string;
}

/** Whole number from `least` to `most`. */
export function readWholeNumber(option: string, text: string, least: number, most: number): number {
  const value = /^\d+$/.test(text) ? Number(text) : Number.NaN;
  if (Number.isSafeInteger(value) && value >= least && value <= most) return value;
  throw usage(`${option}: expected a whole number from ${least} to ${most}, got "${text}"`);
}

/** Duration such as `90`, `90s`, `5m` or `1.5h`; in milliseconds. */
export function readDuration(option: string, text: string): number {
  const match = /^(\d+(?:\.\d+)?)(s|m|min|h)?$/.exec(text);
  const seconds = match === null ? Number.NaN : Number(match[1]) * (SECONDS_PER_UNIT[match[2] ?? ''] ?? Number.NaN);
  if (seconds > 0 && seconds <= LONGEST_SECONDS) return Math.ceil(seconds * 1000);
  throw usage(`${option}: expected a time above 0 such as 90s, 5m or 1h, got "${text}"`);
}

/** One of a list of names; a near miss gets a suggestion. */
export function readName<Name extends string>(what: string, text: string, known: readonly Name[]): Name {
  const found = known.find((name) => name === text);
  if (found !== undefined) return found;
  const near = suggest(text, known);
  const hint = near === null ? '' : `; did you mean "${near}"?`;
  throw usage(`${what}: expected one of ${known.join(', ')}, got "${text}"${hint}`);
}

/** `gap`, `cge`, `ge:left`, … Only `ge` takes a mean. */
export function readConstant(what: string, text: string): ConstantName {
  const [idText = '', meanText, ...rest] = text.trim().split(':');
  if (rest.length > 0) throw usage(`${what}: expected a constant such as cge or ge:left, got "${text}"`);
  const id = readName(what, idText, CONSTANT_IDS);
  if (meanText === undefined) return { id, mean: null };
  if (id !== 'ge') throw usage(`${what}: only ge takes an operator mean, got "${text}"; write "${id}"`);
  return { id, mean: readName(`${what} (mean)`, meanText, MEAN_NAMES) };
}

/** Comma-separated constants, each once, in the order given. */
export function readConstantList(option: string, text: string): ConstantName[] {
  const constants = text.split(',').map((part) => readConstant(option, part));
  const seen = new Set<string>();
  return constants.filter(({ id, mean }) => {
    const key = `${id}:${mean ?? ''}`;
    return !seen.has(key) && seen.add(key);
  });
}

/** `cge=0.5`, `ge:left=11/18`. */
export function readClaim(relation: Claim['relation'], text: string): Claim {
  const option = `--${relation}`;
  const equals = text.indexOf('=');
  if (equals < 1) throw usage(`${option}: expected a constant and a value such as cge=0.5, got "${text}"`);
  const constant = readConstant(option, text.slice(0, equals));
  return { constant, relation, bound: readNumber(option, text.slice(equals + 1).trim()) };
}

/** Finite number above 0. */
export function readPositive(option: string, text: string): number {
  const value = readNumber(option, text);
  if (value > 0) return value;
  throw usage(`${option}: expected a number above 0, got "${text}"`);
}

/** `n=3`: a value for a parameter, not yet read since only the example knows its type. */
export function readSetting(option: string, text: string): Setting {
  const equals = text.indexOf('=');
  if (equals >= 1) return { name: text.slice(0, equals).trim(), text: text.slice(equals + 1).trim() };
  throw usage(`${option}: expected a parameter and its value such as n=3, got "${text}"`);
}

function readNumber(option: string, text: string): number {
  const fraction = /^([+-]?\d+)\/(\d+)$/.exec(text);
  const decimal = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(text);
  const value = fraction ? Number(fraction[1]) / Number(fraction[2]) : decimal ? Number(text) : Number.NaN;
  if (Number.isFinite(value)) return value;
  throw usage(`${option}: expected a finite number such as 0.5 or 11/18, got "${text}"`);
}

function usage(message: string): ThalwegError {
  return new ThalwegError('usage', message);
}
