import { ThalwegError } from '@thalweg/core';
import { completeLimits, SOURCE_LIMIT, type SandboxLimits } from './limits.js';

/** The value of one parameter of an example. */
export type ParameterValue = number | string | boolean;

/** One run of a generator. */
export interface GeneratorRun {
  /** Text of `generate.js`, an ES module without imports. */
  readonly source: string;
  readonly parameters: Readonly<Record<string, ParameterValue>>;
  /** Its default export, `(parameters, kit) => model`, or its export `claims`, `(parameters, kit) => [...]`; [] where there is none. */
  readonly want: 'model' | 'claims';
  readonly limits?: Partial<SandboxLimits>;
}

/** What a run came to. */
export interface GeneratorResult {
  /** JSON text of the returned value, plain finite data. */
  readonly json: string;
}

/** A run checked and completed, plain data for any kind of channel. */
export interface CompleteRun {
  readonly source: string;
  /** JSON text of the parameters. */
  readonly parameters: string;
  readonly want: 'model' | 'claims';
  readonly limits: SandboxLimits;
}

/** Throws `usage` for a run that cannot be meant, `too-large` for a source that is too long. */
export function completeRun({ source, parameters, want, limits }: GeneratorRun): CompleteRun {
  if (typeof source !== 'string')
    throw new ThalwegError('usage', `expected the source as a text, got ${typeof source}`);
  if (source.length > SOURCE_LIMIT) {
    const message = `expected generate.js to have at most ${SOURCE_LIMIT} characters, got ${source.length}; shorten it`;
    throw new ThalwegError('too-large', message);
  }
  if (want !== 'model' && want !== 'claims') {
    throw new ThalwegError('usage', `expected "model" or "claims" to be wanted, got ${String(want)}`);
  }
  for (const [name, value] of Object.entries(parameters)) requireParameter(name, value);
  return { source, parameters: JSON.stringify(parameters), want, limits: completeLimits(limits) };
}

function requireParameter(name: string, value: unknown): void {
  if (typeof value === 'string' || typeof value === 'boolean' || Number.isFinite(value)) return;
  const message = `expected the parameter "${name}" to be a finite number, a text, true or false, got ${String(value)}; correct it`;
  throw new ThalwegError('usage', message);
}
