import { beforeAll, describe, expect, it } from 'vitest';
import { checkCertificate } from '../../src/checker/check-certificate.js';
import type { LiftCertificate, MatrixEntry } from '../../src/checker/lift-certificate.js';
import { doubleOf } from '../../src/checker/scalar.js';
import { thermalQubit } from '../../src/families/index.js';
import type { Generator } from '../../src/generator/generator.js';
import { multiply, multiplyAdjointSecond } from '../../src/linalg/complex-matrix.js';
import { denseFromSparse, sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { seededRandom } from '../../src/random.js';
import { madeCertificate } from '../helpers/made-certificate.js';
import { randomUnitary } from '../linalg/support/inputs.js';

const u = randomUnitary(seededRandom('frame'), 2);
const plain = thermalQubit({ beta: 1 });
/** The thermal qubit in another basis: its state is not diagonal there. */
const turned: Generator = {
  ...plain,
  jumps: plain.jumps.map(({ matrix, ...rest }) => ({
    ...rest,
    matrix: sparseFromDense(multiplyAdjointSecond(multiply(u, denseFromSparse(matrix)), u)),
  })),
  declaredState: null,
  origin: { kind: 'lindblad' },
};
let certificate: LiftCertificate;

beforeAll(() => {
  certificate = madeCertificate(turned).certificate;
});

describe('a certificate in a frame', () => {
  const failing = (edited: LiftCertificate): string | undefined =>
    checkCertificate(turned, edited).conditions.find(({ holds }) => !holds)?.name;
  const withFrame = (change: (entry: MatrixEntry, k: number) => MatrixEntry): LiftCertificate => ({
    ...certificate,
    frame: (certificate.frame ?? []).map(change),
  });

  it('is enclosed, and comes within 1e-6 of the value', () => {
    const { grade, bound } = checkCertificate(turned, certificate);
    expect(certificate.frame).toHaveLength(4);
    expect(grade).toBe('enclosed');
    expect(2 * Math.cosh(0.5) - bound).toBeGreaterThanOrEqual(0);
    expect(2 * Math.cosh(0.5) - bound).toBeLessThan(1e-6);
  });

  it('is refused without it, in another, and for the model in the plain basis', () => {
    const { frame: _, ...without } = certificate;
    const assembly = 'L from the jumps, against the doubles of the model';
    expect(failing(without)).toBe(assembly);
    expect(failing(withFrame(([i, j, re, im]) => [1 - i, j, re, im]))).toBe(assembly);
    expect(checkCertificate(plain, certificate).holds).toBe(false);
  });

  it('is refused when the frame is not unitary, or misshapen', () => {
    const first = ([i, j, re, im]: MatrixEntry, k: number): MatrixEntry => [
      i,
      j,
      doubleOf(re) + (k === 0 ? 1e-9 : 0),
      im,
    ];
    expect(failing(withFrame(first))).toBe('frame unitary, in the algebra');
    expect(failing({ ...certificate, frame: [] })).toBe('shape of the certificate');
    expect(failing({ ...certificate, frame: [[0, 5, 1, 0]] })).toBe('shape of the certificate');
  });
});
