import { ThalwegError } from '@thalweg/core';
import {
  completePoint,
  unknownName,
  type ExampleDocument,
  type ParameterPoint,
  type ParameterValue,
} from '@thalweg/format';
import { settingsPoint, withOption } from '../input/read-model.js';
import type { Setting } from '../verbs/option-values.js';
import { expandRange, MOST_POINTS } from './expand-range.js';

/** All combinations of the swept values, the last parameter fastest; the others as `--set` says, or their defaults. */
export function sweepPoints(
  document: ExampleDocument,
  { over, set }: { readonly over: readonly Setting[]; readonly set: readonly Setting[] },
): ParameterPoint[] {
  const { parameters } = document;
  const fixed = settingsPoint(document, set);
  let points: Record<string, ParameterValue>[] = [{}];
  for (const { name, text } of over) {
    const parameter = parameters.find((declared) => declared.name === name);
    if (!parameter) throw new ThalwegError('usage', `--over: ${unknownName(parameters, name)}`);
    refuseTwice(name, points[0] ?? {}, set);
    const values = withOption('--over', () => expandRange(parameter, text));
    if (values.length * points.length > MOST_POINTS) {
      const message = `--over: expected at most ${MOST_POINTS} points, got ${values.length * points.length}; take larger steps`;
      throw new ThalwegError('usage', message);
    }
    points = points.flatMap((point) => values.map((value) => ({ ...point, [name]: value })));
  }
  return points.map((point) => completePoint(parameters, { ...fixed, ...point }));
}

function refuseTwice(name: string, swept: Readonly<Record<string, unknown>>, set: readonly Setting[]): void {
  const other = Object.hasOwn(swept, name) ? '--over' : set.some((setting) => setting.name === name) ? '--set' : null;
  if (other === null) return;
  throw new ThalwegError(
    'usage',
    `--over: expected each parameter once, got "${name}" in ${other} as well; leave one out`,
  );
}
