import { blockAlgebra } from '@thalweg/core';
import { expect, test } from 'vitest';
import { requireMemory } from '../../src/compute/tasks/require-memory.js';

const GIBIBYTE = 2 ** 30;
const qubits = (n: number) => ({ size: 2 ** n, dimension: 4 ** n });

test('ten qubits fit into a gibibyte, twelve do not fit into ten', () => {
  expect(() => requireMemory(qubits(10), GIBIBYTE)).not.toThrow();
  expect(() => requireMemory(qubits(12), 10 * GIBIBYTE)).toThrow(/fits into the 10 GiB of memory here/);
});

test('a chain needs matrices, though its dimension is small', () => {
  const chain = { size: 4096, dimension: 4096 };
  expect(() => requireMemory(chain, 2 * GIBIBYTE)).toThrow(/algebra dimension 4096 that needs about 2 GiB/);
});

test('what does not fit is refused with both sizes', () => {
  expect(() => requireMemory(blockAlgebra([4]), 12 * 1024)).not.toThrow();
  expect(() => requireMemory(blockAlgebra([4]), 11 * 1024)).toThrow(
    /^expected a model that fits into the 11 KiB of memory here, got one of algebra dimension 16 that needs about 12 KiB; reduce/,
  );
});
