import { describe, expect, it } from 'vitest';
import { checkCertificate } from '../../src/checker/check-certificate.js';
import type { CertificateJump, LiftCertificate, MatrixEntry } from '../../src/checker/lift-certificate.js';
import { type Scalar, doubleOf, rationalOf } from '../../src/checker/scalar.js';
import { addRational, rationalFromDouble } from '../../src/checker/arithmetic/rational.js';
import { cycle, dephasing, depolarising, thermalQubit } from '../../src/families/index.js';
import type { Generator } from '../../src/generator/generator.js';
import { type Random, seededRandom } from '../../src/random.js';
import { madeCertificate } from '../helpers/made-certificate.js';

const MODELS: [string, Generator][] = [
  ['thermal qubit', thermalQubit({ beta: 1 })],
  ['depolarising qubit', depolarising(2)],
  ['dephasing of three levels', dephasing(3)],
  ['cycle of four points', cycle(4)],
];

/** Corruptions of each model. */
const COUNT = 2500;

/** A number moved by a relative 1e-6 to 1e3, or replaced; always by more than a residual may be. */
function moved(x: Scalar, random: Random): Scalar {
  const value = doubleOf(x);
  const size = Math.max(0.1, Math.abs(value)) * 10 ** (9 * random.uniform() - 6);
  const step = random.uniform() < 0.5 ? size : -size;
  return typeof x === 'number' ? value + step : addRational(rationalOf(x), rationalFromDouble(step));
}

/** The certificate with one of its numbers moved; never `bound`. */
function corrupted(c: LiftCertificate, random: Random): LiftCertificate {
  const at = <T>(list: readonly T[], change: (item: T) => T): T[] => {
    const k = random.integer(list.length);
    return list.map((item, i) => (i === k ? change(item) : item));
  };
  const inEntry = (entries: readonly MatrixEntry[]): MatrixEntry[] =>
    at(entries, ([i, j, x, y]): MatrixEntry => (random.uniform() < 0.5 ? [i, j, moved(x, random), y] : [i, j, x, moved(y, random)])); // prettier-ignore
  switch (random.integer(5)) {
    case 0:
      return { ...c, state: inEntry(c.state) };
    case 1:
      return { ...c, jumps: at(c.jumps, (jump): CertificateJump => ({ ...jump, entries: inEntry(jump.entries) })) };
    case 2:
      return { ...c, jumps: at(c.jumps, (jump) => ({ ...jump, rate: moved(jump.rate, random) })) };
    case 3:
      return { ...c, jumps: at(c.jumps, (jump) => ({ ...jump, ratio: moved(jump.ratio, random) })) };
    default:
      return {
        ...c,
        lift: at(c.lift, (term) =>
          random.uniform() < 0.5 ? { ...term, re: moved(term.re, random) } : { ...term, im: moved(term.im, random) },
        ),
      };
  }
}

describe.each(MODELS)('%s', (name, g) => {
  it(`refuses ${COUNT} certificates with one number moved`, () => {
    const { certificate } = madeCertificate(g);
    const random = seededRandom(`corrupted ${name}`);
    expect(checkCertificate(g, certificate).holds).toBe(true);
    const accepted: LiftCertificate[] = [];
    for (let k = 0; k < COUNT; k++) {
      const edited = corrupted(certificate, random);
      if (checkCertificate(g, edited).holds) accepted.push(edited);
    }
    expect(accepted).toEqual([]);
  });

  it('a smaller K is still proved, a larger one is not', () => {
    const { certificate, ceiling } = madeCertificate(g);
    const random = seededRandom(`bounds ${name}`);
    for (let k = 0; k < 20; k++) {
      const step = 10 ** (-8.5 + 8 * random.uniform());
      const below = { ...certificate, bound: doubleOf(certificate.bound) - step };
      expect(checkCertificate(g, below).holds).toBe(true);
      expect(checkCertificate(g, { ...certificate, bound: ceiling + step }).holds).toBe(false);
    }
  });
});
