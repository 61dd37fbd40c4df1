import { expect, test } from 'vitest';
import { memoryText } from '../src/memory-text.js';

test.each([
  [0, '0 bytes'],
  [1023, '1020 bytes'],
  [1024, '1 KiB'],
  [8 * 1089 ** 2, '9.05 MiB'],
  [16 * 100_000 ** 2, '149 GiB'],
  [1.9e15 * 1.1, '1.86 PiB'],
  [1e24, '867000 EiB'],
])('%d bytes', (bytes, text) => {
  expect(memoryText(bytes)).toBe(text);
});
