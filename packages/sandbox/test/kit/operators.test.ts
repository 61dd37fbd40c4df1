import { expect, test } from 'vitest';
import * as kit from '../../src/kit/names.js';
import type { Matrix, MatrixLike } from '../../src/kit/matrix/matrix.js';

/** Largest size of an entry of a − b. */
function distance(a: MatrixLike, b: MatrixLike): number {
  return kit.subtract(a, b).entries.reduce((most, [, , re, im]) => Math.max(most, Math.hypot(re, im)), 0);
}

const I = { re: 0, im: 1 };
const ROUNDING = 1e-14;

test('every form of a matrix becomes the same entries, zeros and repeated places aside', () => {
  const y: Matrix = {
    shape: [2, 2],
    entries: [
      [0, 1, 0, -1],
      [1, 0, 0, 1],
    ],
  };
  expect(kit.pauli('Y')).toEqual(y);
  expect(kit.matrix({ pauli: { Y: 1 } })).toEqual(y);
  expect(
    kit.matrix({
      re: [
        [0, 0],
        [0, 0],
      ],
      im: [
        [0, -1],
        [1, 0],
      ],
    }),
  ).toEqual(y);
  expect(
    kit.matrix([
      [0, kit.complex(0, -1)],
      [kit.complex(0, 1), 0],
    ]),
  ).toEqual(y);
  expect(
    kit.matrix({
      shape: [2, 2],
      entries: [
        [1, 0, 0, 0.5],
        [0, 1, 0, -1],
        [1, 0, 0, 0.5],
        [1, 1, 0, 0],
      ],
    }),
  ).toEqual(y);
  expect(kit.parts(y)).toEqual({
    re: [
      [0, 0],
      [0, 0],
    ],
    im: [
      [0, -1],
      [1, 0],
    ],
  });
  expect(kit.rows(kit.pauli('X'))).toEqual([
    [0, 1],
    [1, 0],
  ]);
  expect(kit.entry(y, 1, 0)).toEqual({ re: 0, im: 1 });
});

test('Pauli matrices: XY = iZ, and strings are Kronecker products', () => {
  expect(kit.multiply(kit.pauli('X'), kit.pauli('Y'))).toEqual(kit.scale(I, kit.pauli('Z')));
  expect(kit.pauli('XYZI')).toEqual(kit.kron(kit.pauli('X'), kit.pauli('Y'), kit.pauli('Z'), kit.identity(2)));
});

test('Weyl operators: ZX = e^{2πi/n} XZ, unitary, X^n = Z^n = 1', () => {
  for (const n of [2, 3, 5, 6]) {
    const [x, z] = [kit.weyl(n, 1, 0), kit.weyl(n, 0, 1)];
    expect(distance(kit.multiply(z, x), kit.scale(kit.rootOfUnity(1, n), kit.multiply(x, z)))).toBeLessThan(ROUNDING);
    const w = kit.weyl(n, 2, 1);
    expect(distance(kit.multiply(kit.adjoint(w), w), kit.identity(n))).toBeLessThan(ROUNDING);
    expect(distance(kit.multiply(...new Array<Matrix>(n).fill(z)), kit.identity(n))).toBeLessThan(ROUNDING);
    expect(kit.multiply(...new Array<Matrix>(n).fill(x))).toEqual(kit.identity(n));
  }
});

test('spin operators: [S_x, S_y] = i S_z and S² = s(s+1)', () => {
  for (const s of [0.5, 1, 1.5, 3]) {
    const [x, y, z] = [kit.spinX(s), kit.spinY(s), kit.spinZ(s)];
    expect(distance(kit.commutator(x, y), kit.scale(I, z))).toBeLessThan(10 * ROUNDING);
    const square = kit.add(kit.multiply(x, x), kit.multiply(y, y), kit.multiply(z, z));
    expect(distance(square, kit.scale(s * (s + 1), kit.identity(2 * s + 1)))).toBeLessThan(10 * ROUNDING);
  }
});

test('ladder operators: a*a counts, [a, a*] = 1 below the cut', () => {
  const n = 5;
  const a = kit.annihilation(n);
  expect(distance(kit.multiply(kit.creation(n), a), kit.numberOperator(n))).toBeLessThan(ROUNDING);
  const defect = kit.subtract(kit.commutator(a, kit.creation(n)), kit.identity(n));
  expect(distance(defect, kit.scale(-n, kit.matrixUnit(n, n - 1, n - 1)))).toBeLessThan(ROUNDING);
});

test('fermions anticommute: {a_k, a_l*} = δ_kl, {a_k, a_l} = 0; Majorana operators square to 1', () => {
  const m = 3;
  for (let k = 0; k < m; k++) {
    for (let l = 0; l < m; l++) {
      const [a, b] = [kit.fermionAnnihilation(m, k), kit.fermionAnnihilation(m, l)];
      expect(kit.anticommutator(a, kit.adjoint(b))).toEqual(k === l ? kit.identity(8) : kit.zero(8));
      expect(kit.anticommutator(a, b)).toEqual(kit.zero(8));
    }
  }
  for (let k = 0; k < 2 * m; k++) {
    for (let l = 0; l < 2 * m; l++) {
      const both = kit.anticommutator(kit.majorana(m, k), kit.majorana(m, l));
      expect(both).toEqual(k === l ? kit.scale(2, kit.identity(8)) : kit.zero(8));
    }
  }
});

test('site operators, direct sums, traces and Gibbs states', () => {
  expect(kit.site(3, 1, kit.pauli('Y'))).toEqual(kit.pauli('IYI'));
  expect(
    kit.sites(3, [
      [2, kit.pauli('Z')],
      [0, kit.pauli('X')],
    ]),
  ).toEqual(kit.pauli('XIZ'));
  expect(kit.directSum(kit.pauli('X'), [[3]])).toEqual(
    kit.matrix([
      [0, 1, 0],
      [1, 0, 0],
      [0, 0, 3],
    ]),
  );
  expect(kit.trace(kit.directSum(kit.identity(4), kit.scale(I, kit.identity(2))))).toEqual({ re: 4, im: 2 });
  const weights = kit.gibbsWeights([0, 1, 800], 2);
  expect(weights.reduce((a, b) => a + b)).toBeCloseTo(1, 14);
  expect(weights[1] / weights[0]).toBeCloseTo(Math.exp(-2), 15);
});

test.each<[string, () => unknown]>([
  ['expected 2 entries in row 1, got 1', () => kit.matrix([[1, 2], [3]])],
  ['expected the real part to be a finite number, got NaN', () => kit.matrix([[NaN]])],
  ['expected a matrix of shape 2 × 2, got 3 × 3', () => kit.add(kit.identity(2), kit.identity(3))],
  ['expected a matrix of 2 rows as the right factor, got 3 × 3', () => kit.multiply(kit.identity(2), kit.identity(3))],
  ['expected a Pauli string of 1 to 12 letters I, X, Y, Z, got "XQ"', () => kit.pauli('XQ')],
  ['expected a row to be a whole number from 0 to 1, got 2', () => kit.matrixUnit(2, 2, 0)],
  [
    'expected one operator on site 0, got another',
    () =>
      kit.sites(2, [
        [0, kit.pauli('X')],
        [0, kit.pauli('Z')],
      ]),
  ],
  ['expected twice the spin to be a whole number from 1 to 4095, got 0.5', () => kit.spinZ(0.25)],
  ['expected the number of modes to be a whole number from 1 to 10, got 11', () => kit.majorana(11, 0)],
  ['expected a real matrix, got the imaginary part -1 in row 0, column 1', () => kit.rows(kit.pauli('Y'))],
])('%s', (message, call) => {
  expect(call).toThrow(message);
});
