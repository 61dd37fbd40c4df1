import { ThalwegError } from '@thalweg/core';
import { expect, test } from 'vitest';
import { inDocument } from '../../src/input/in-document.js';

function caught(run: () => unknown): unknown {
  try {
    return run();
  } catch (error) {
    return error;
  }
}

function thrown(error: unknown): () => never {
  return () => {
    throw error;
  };
}

test('an error says which document it is about', () => {
  const error = new ThalwegError('negative-rate', 'a rate', { pointer: '/rate', details: { value: -1 } });
  expect(caught(() => inDocument('m.json', thrown(error)))).toMatchObject({
    code: 'negative-rate',
    message: 'a rate',
    pointer: '/rate',
    details: { value: -1, document: 'm.json' },
    cause: error,
  });
});

test('a complaint about a value of the document is no usage error', () => {
  const about = (context: object) =>
    caught(() => inDocument('m.json', thrown(new ThalwegError('usage', 'a value', context))));
  expect(about({ pointer: '/generator' })).toMatchObject({ code: 'wrong-schema' });
  expect(about({})).toMatchObject({ code: 'usage', details: { document: 'm.json' } });
});

test('the innermost document is named, and other errors pass', () => {
  const inner = () => inDocument('rho.json', thrown(new ThalwegError('not-json', 'no JSON')));
  expect(caught(() => inDocument('m.json', inner))).toMatchObject({ details: { document: 'rho.json' } });
  const fault = new TypeError('a fault');
  expect(caught(() => inDocument('m.json', thrown(fault)))).toBe(fault);
  expect(inDocument('m.json', () => 1)).toBe(1);
});
