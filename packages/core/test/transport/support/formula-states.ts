import {
  type ComplexMatrix,
  addScaledInto,
  fromEntries,
  hermitianPart,
  identity,
  multiplyAdjointSecond,
  scale,
  trace,
} from '../../../src/linalg/complex-matrix.js';

/** A faithful state by formula, as tests/bench/transport_action.py has it: (AA* + 0.3)/Tr, A_ij = cos(i + 2j + 1 + s) + i sin(2i − j + 3s). */
export function formulaState(n: number, shift: number): ComplexMatrix {
  const a = fromEntries(n, n, (i, j) => [Math.cos(i + 2 * j + 1 + shift), Math.sin(2 * i - j + 3 * shift)]);
  const square = addScaledInto(multiplyAdjointSecond(a, a), identity(n), 0.3);
  return hermitianPart(scale(square, 1 / trace(square).re));
}
