import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ThalwegError } from '@thalweg/core';
import { checkModel, parseModel } from '../../src/schema/parse-document.js';
import { caughtError, refusal } from '../support/caught-error.js';
import { EVERY_FORM } from '../support/every-form.js';

const model = (generator: unknown, more: object = { algebra: [2] }) => ({
  schema: 'thalweg.model/1',
  ...more,
  generator,
});
const lindblad = (jump: unknown) => model({ form: 'lindblad', jumps: [jump] });

describe('the model schema', () => {
  it.each(Object.entries(EVERY_FORM))('accepts the form %s and changes nothing', (_form, document) => {
    expect(parseModel(JSON.stringify(document))).toStrictEqual(document);
  });

  it('accepts a title, a state and a provenance', () => {
    const document = {
      ...lindblad({
        label: 'σ−',
        rate: 0.5,
        matrix: [
          [0, 1],
          [0, 0],
        ],
      }),
      title: 'Amplitude damping',
      state: { shape: [2, 2], entries: [[0, 0, 1, 0]] },
      provenance: {
        example: 'ada/damping@1.2.0',
        parameters: { gamma: 0.5, names: ['a', null, true] },
        source: '10.1000/182',
        tool: { name: 'thalweg', version: '0.1.0' },
        note: 'for a test',
      },
    };
    expect(checkModel(document)).toStrictEqual(document);
  });

  it('reports few issues for a long list of wrong items', () => {
    const jumps = new Array<number>(20_000).fill(1);
    expect(refusal(() => checkModel(model({ form: 'lindblad', jumps })))).toEqual([
      'wrong-schema',
      '/generator/jumps',
      'expected a list of at most 10000 items, got a list of 20000; correct /generator/jumps',
    ]);
  });

  it('refuses a value that contains itself', () => {
    const sum = { form: 'sum', terms: [] as unknown[] };
    sum.terms.push({ weight: 1, generator: sum });
    expect(refusal(() => checkModel(model(sum)))).toEqual([
      'too-large',
      `/generator${'/terms/0/generator'.repeat(21)}`,
      'expected at most 64 levels of nesting, got more; flatten the document or break the cycle',
    ]);
  });

  it('names the place of a syntax error, too', () => {
    const error = caughtError(() => parseModel('{"schema": "thalweg.model/1", "algebra": [2,]}'));
    expect([error.code, error.pointer]).toEqual(['not-json', '/algebra/1']);
  });

  it('never throws anything but a ThalwegError', () => {
    const strange = fc.oneof(
      fc.anything({ maxDepth: 3, withNullPrototype: true }),
      fc.constantFrom(...Object.values(EVERY_FORM)),
    );
    fc.assert(
      fc.property(strange, fc.object({ maxDepth: 3 }), (value, generator) => {
        for (const document of [
          value,
          model(value),
          model(generator),
          model({ form: 'lindblad', jumps: [{ matrix: value }] }),
        ]) {
          try {
            checkModel(document);
          } catch (error) {
            expect(error).toBeInstanceOf(ThalwegError);
          }
        }
      }),
      { numRuns: 500 },
    );
  });

  it('points at a changed place in any document: one field replaced, removed or added', () => {
    const documents = fc.constantFrom(...Object.values(EVERY_FORM));
    fc.assert(
      fc.property(documents, fc.nat(), fc.constantFrom('replace', 'remove', 'add'), (document, pick, change) => {
        const copy = structuredClone(document) as unknown;
        const places = objectsIn(copy);
        const [object, path] = places[pick % places.length] ?? [{}, ''];
        const keys = Object.keys(object);
        const key = keys[pick % keys.length] ?? '';
        if (change === 'add') object['extra'] = 1;
        else if (change === 'remove') delete object[key];
        else object[key] = Symbol.iterator;
        try {
          expect(checkModel(copy)).toEqual(copy);
          expect(change).toBe('remove');
        } catch (error) {
          if (!(error instanceof ThalwegError)) throw error;
          const isPrefix = (error.pointer ?? '').startsWith(path) || path.startsWith(error.pointer ?? '');
          expect([error.pointer, path, isPrefix]).toEqual([error.pointer, path, true]);
        }
      }),
      { numRuns: 1000 },
    );
  });
});

/** Every object (not list) in a value, with its JSON pointer. */
function objectsIn(value: unknown, path = ''): [Record<string, unknown>, string][] {
  if (typeof value !== 'object' || value === null) return [];
  const own: [Record<string, unknown>, string][] = Array.isArray(value)
    ? []
    : [[value as Record<string, unknown>, path]];
  return [...own, ...Object.entries(value).flatMap(([key, field]) => objectsIn(field, `${path}/${key}`))];
}
