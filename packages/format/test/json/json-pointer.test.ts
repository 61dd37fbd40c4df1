import { expect, it } from 'vitest';
import { jsonPointer } from '../../src/json/json-pointer.js';

it('writes RFC 6901 pointers', () => {
  expect(jsonPointer([])).toBe('');
  expect(jsonPointer(['generator', 'jumps', 0, 'matrix'])).toBe('/generator/jumps/0/matrix');
  expect(jsonPointer(['a/b', 'm~n', '', '~1'])).toBe('/a~1b/m~0n//~01');
});
