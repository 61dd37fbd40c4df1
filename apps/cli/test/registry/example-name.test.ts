import { describe, expect, it } from 'vitest';
import { isExampleName, readExampleName, versionPath } from '../../src/registry/example-name.js';

describe('names of examples on a registry', () => {
  it.each([
    ['mira/two-points', { owner: 'mira', slug: 'two-points', version: null }],
    ['mira/two-points@1.0.0', { owner: 'mira', slug: 'two-points', version: '1.0.0' }],
    ['m-2/x1@2.0.0-alpha.1', { owner: 'm-2', slug: 'x1', version: '2.0.0-alpha.1' }],
  ])('%s', (text, name) => {
    expect(readExampleName(text)).toEqual(name);
  });

  it.each([
    'mira',
    'mira/two/points',
    './mira',
    '../mira/x',
    'Mira/x',
    'mira/x@1',
    'mira/x@v1.0.0',
    'mira/x@',
    '/x',
    'a b/c',
  ])('not %s', (text) => {
    expect(isExampleName(text)).toBe(false);
    expect(() => readExampleName(text)).toThrow(/expected an example such as/);
  });

  it('become paths', () => {
    expect(versionPath({ owner: 'mira', slug: 'x1', version: '1.0.0-a' })).toBe(
      '/api/v1/examples/mira/x1/versions/1.0.0-a',
    );
  });
});
