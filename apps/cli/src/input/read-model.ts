import { ThalwegError } from '@thalweg/core';
import {
  completePoint,
  readParameterValue,
  unknownName,
  type ExampleDocument,
  type ExamplePackage,
  type ParameterPoint,
  type ParameterValue,
} from '@thalweg/format';
import type { Session } from '../session.js';
import type { Setting } from '../verbs/option-values.js';
import { readInput } from './read-package.js';
import type { DocumentSource } from './read-source.js';

/** A model, or an example with the values of its parameters. */
export interface ModelChoice {
  readonly model: string;
  readonly set: readonly Setting[];
}

/** The model document at a path, or the one that the example at the path generates at the parameters of `--set`. */
export async function readModel({ model, set }: ModelChoice, session: Session): Promise<DocumentSource> {
  const input = await readInput(model, session);
  if (input.kind === 'example') {
    return generateModel(input.example, settingsPoint(input.example.document, set), session);
  }
  if (set.length === 0) return input.source;
  throw new ThalwegError(
    'usage',
    `--set: expected an example (a folder or an archive) whose parameters to set, got the document ${model}; leave --set out`,
  );
}

/** The point that `--set` asks for, with defaults for the rest. Throws `usage` for a name or value that the example does not know. */
export function settingsPoint({ parameters }: ExampleDocument, set: readonly Setting[]): ParameterPoint {
  const values: Record<string, ParameterValue> = {};
  for (const { name, text } of set) {
    const parameter = parameters.find((declared) => declared.name === name);
    if (parameter === undefined) throw new ThalwegError('usage', `--set: ${unknownName(parameters, name)}`);
    if (Object.hasOwn(values, name)) {
      throw new ThalwegError('usage', `--set: expected each parameter once, got "${name}" again; leave one out`);
    }
    values[name] = withOption('--set', () => readParameterValue(parameter, text));
  }
  return completePoint(parameters, values);
}

/** The model of an example at a point, as its generator wrote it. */
export async function generateModel(
  { document, generator }: ExamplePackage,
  point: ParameterPoint,
  session: Session,
): Promise<DocumentSource> {
  const name = pointName(document, point);
  const json = await session.generate({ source: generator, parameters: point, want: 'model' }, name);
  return { name, bytes: new TextEncoder().encode(json), folder: null };
}

/** `depolarising (n=3)`: how a generated model is named to people. */
export function pointName({ name }: ExampleDocument, point: ParameterPoint): string {
  const settings = Object.entries(point).map(([parameter, value]) => `${parameter}=${String(value)}`);
  return settings.length === 0 ? name : `${name} (${settings.join(', ')})`;
}

/** Runs `read`; its complaint begins with the name of the option. */
export function withOption<Result>(option: string, read: () => Result): Result {
  try {
    return read();
  } catch (error) {
    if (error instanceof ThalwegError) throw new ThalwegError('usage', `${option}: ${error.message}`);
    throw error;
  }
}
