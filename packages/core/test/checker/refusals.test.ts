import { beforeAll, describe, expect, it } from 'vitest';
import { addRational, rational, rationalFromDouble } from '../../src/checker/arithmetic/rational.js';
import { checkCertificate } from '../../src/checker/check-certificate.js';
import type { CertificateTerm, LiftCertificate } from '../../src/checker/lift-certificate.js';
import { type Scalar, doubleOf, rationalOf } from '../../src/checker/scalar.js';
import { depolarising, thermalQubit } from '../../src/families/index.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { madeCertificate, roundedCertificate } from '../helpers/made-certificate.js';

const QUBIT = thermalQubit({ beta: 1 });
const POINTS = ratesGenerator([
  [0, 1],
  [2, 0],
]);
let rounded: LiftCertificate;
let enclosed: LiftCertificate;
let exact: LiftCertificate;

beforeAll(() => {
  rounded = roundedCertificate(QUBIT);
  enclosed = madeCertificate(QUBIT).certificate;
  exact = madeCertificate(POINTS).certificate;
});

function failing(certificate: LiftCertificate, g = QUBIT): string | undefined {
  const verdict = checkCertificate(g, certificate);
  expect(verdict.holds).toBe(false);
  expect(verdict.grade).toBeNull();
  return verdict.conditions.find(({ holds }) => !holds)?.name;
}

function withJump(certificate: LiftCertificate, changes: object): LiftCertificate {
  return { ...certificate, jumps: certificate.jumps.map((jump, j) => (j === 0 ? { ...jump, ...changes } : jump)) };
}

function withTerms(certificate: LiftCertificate, change: (term: CertificateTerm, t: number) => CertificateTerm) {
  return { ...certificate, lift: certificate.lift.map(change) };
}

describe('a certificate in floating point', () => {
  it('is accepted as it is', () => {
    expect(checkCertificate(QUBIT, rounded)).toMatchObject({ holds: true, grade: 'certified' });
  });

  it('proves nothing for K above the truth by 1e-9', () => {
    expect(failing({ ...rounded, bound: 2 * Math.cosh(0.5) + 1e-9 })).toBe('left form');
  });

  it('proves nothing for K above the truth by 1e-6', () => {
    expect(failing({ ...rounded, bound: 2 * Math.cosh(0.5) + 1e-6 })).toBe('left form');
  });

  it('claims no grade that it does not reach', () => {
    expect(failing({ ...rounded, grade: 'exact' })).toBe('σWσ⁻¹ = W/ratio for every jump');
  });

  const cases: [string, (c: LiftCertificate) => LiftCertificate, string][] = [
    ['the state scaled', (c) => ({ ...c, state: c.state.map(([i, j, x, y]) => [i, j, 1.01 * doubleOf(x), y]) }), 'state Hermitian, in the algebra, trace 1'], // prettier-ignore
    ['a state that is not faithful', (c) => ({ ...c, state: [[0, 0, 1, 0]] }), 'state faithful, smallest eigenvalue'],
    ['another faithful state', (c) => ({ ...c, state: [[0, 0, 0.5, 0], [1, 1, 0.5, 0]] }), 'σWσ⁻¹ = W/ratio for every jump'], // prettier-ignore
    ['a rate that is not its partner’s', (c) => withJump(c, { rate: 1 }), 'partners are adjoints'],
    ['a partner that is not the adjoint', (c) => withJump(c, { partner: 0 }), 'partners are adjoints'],
    ['one jump doubled, its rate quartered', (c) => withJump(c, { entries: c.jumps[0].entries.map(([i, j, x, y]) => [i, j, 2 * doubleOf(x), y]), rate: doubleOf(c.jumps[0].rate) / 4 }), 'partners are adjoints'], // prettier-ignore
    ['all rates doubled', (c) => ({ ...c, jumps: c.jumps.map((jump) => ({ ...jump, rate: 2 * doubleOf(jump.rate) })) }), 'L from the jumps'], // prettier-ignore
    ['left and right swapped with another jump', (c) => withTerms(c, ({ left, right, ...rest }) => ({ ...rest, left: right, right: left < 0 ? left : 1 - left })), '∂L = L̂∂ on every matrix unit'], // prettier-ignore
    ['a coefficient off by 1e-7', (c) => withTerms(c, (term, t) => (t === 0 ? { ...term, re: doubleOf(term.re) + 1e-7 } : term)), '∂L = L̂∂ on every matrix unit'], // prettier-ignore
    ['no lift at all', (c) => ({ ...c, lift: [] }), '∂L = L̂∂ on every matrix unit'],
    ['a huge bound', (c) => ({ ...c, bound: 1e300 }), 'shape of the certificate'],
    ['a huge rate', (c) => withJump(c, { rate: 1e300 }), 'shape of the certificate'],
    ['a huge coefficient', (c) => withTerms(c, (term) => ({ ...term, re: 1e55 })), '∂L = L̂∂ on every matrix unit'],
    ['a bound that is not a number', (c) => ({ ...c, bound: Number.NaN }), 'shape of the certificate'],
    ['a coefficient that is not a number', (c) => withTerms(c, (term) => ({ ...term, im: Number.NaN })), 'shape of the certificate'], // prettier-ignore
    ['a negative rate', (c) => withJump(c, { rate: -1 }), 'shape of the certificate'],
    ['a partner that is not there', (c) => withJump(c, { partner: 7 }), 'shape of the certificate'],
    ['an entry outside', (c) => withJump(c, { entries: [[0, 5, 1, 0]] }), 'shape of the certificate'],
    ['a place named twice', (c) => withJump(c, { entries: [[0, 1, 1, 0], [0, 1, 1, 0]] }), 'shape of the certificate'], // prettier-ignore
    ['a term without its jump', (c) => withTerms(c, (term) => ({ ...term, to: 9 })), 'shape of the certificate'],
    ['no jumps', (c) => ({ ...c, jumps: [], lift: [] }), 'shape of the certificate'],
    ['other blocks', (c) => ({ ...c, blocks: [1, 1] }), 'shape of the certificate'],
  ];
  it.each(cases)('is refused with %s', (_name, edit, condition) => {
    expect(failing(edit(rounded))).toBe(condition);
  });
});

describe('an exact certificate', () => {
  const plus = (x: Scalar, y: number): Scalar => addRational(rationalOf(x), rationalFromDouble(y));

  it('is accepted as it is', () => {
    expect(checkCertificate(POINTS, exact)).toMatchObject({ holds: true, grade: 'exact', bound: 2.5, allowance: 0 });
  });

  it('proves nothing for K larger by 2^-200', () => {
    const tiny = rational(1n, 2n ** 200n);
    expect(failing({ ...exact, bound: addRational(rationalOf(exact.bound), tiny) }, POINTS)).toBe('left form');
  });

  it.each(exact0().map((t) => [t]))('is refused with coefficient %i off by 2^-100', (t) => {
    const edited = withTerms(exact, (term, u) => (u === t ? { ...term, re: plus(term.re, 2 ** -100) } : term));
    expect(failing(edited, POINTS)).toBe('∂L = L̂∂ on every matrix unit');
  });

  it('is refused when the model differs by 1e-12', () => {
    const other = ratesGenerator([
      [0, 1],
      [2 + 1e-12, 0],
    ]);
    expect(failing(exact, other)).toBe('L from the jumps, against the doubles of the model');
  });

  it('is refused with a state that is off by 2^-100', () => {
    const state = exact.state.map(([i, j, x, y]) => [i, j, plus(x, i === 0 ? 2 ** -100 : -(2 ** -100)), y] as const);
    expect(failing({ ...exact, state }, POINTS)).toBe('σWσ⁻¹ = W/ratio for every jump');
  });
});

/** Terms of a lift of two points. */
function exact0(): number[] {
  return [0, 1, 2, 3];
}

it('clsi and mlsi need a positive bound', () => {
  expect(checkCertificate(QUBIT, { ...rounded, constant: 'clsi' }).holds).toBe(true);
  expect(failing({ ...rounded, constant: 'mlsi', bound: -0.5 })).toBe('bound positive, as cge ≤ mlsi needs');
  expect(checkCertificate(QUBIT, { ...rounded, constant: 'ge', bound: -0.5 }).holds).toBe(true);
});

it('a residual lowers the bound by what the rule says', () => {
  const g = depolarising(2);
  const moved = withTerms({ ...roundedCertificate(g), bound: 0.7 }, (term, t) => (t === 0 ? { ...term, re: doubleOf(term.re) * (1 + 1e-10) } : term)); // prettier-ignore
  const { holds, bound, allowance } = checkCertificate(g, moved);
  expect(holds).toBe(true);
  expect(allowance).toBeGreaterThan(1e-11);
  expect(allowance).toBeLessThan(1e-8);
  expect(bound).toBe(0.7 - allowance);
});

describe('an enclosed certificate', () => {
  const plus = (x: Scalar, y: number): Scalar => addRational(rationalOf(x), rationalFromDouble(y));

  it('is accepted as it is, and proves at most its K', () => {
    const verdict = checkCertificate(QUBIT, enclosed);
    expect(verdict).toMatchObject({ holds: true, grade: 'enclosed', exactBound: null });
    expect(verdict.bound).toBeLessThanOrEqual(doubleOf(enclosed.bound));
    expect(doubleOf(enclosed.bound) - verdict.bound).toBeLessThan(1e-11);
  });

  it.each([1e-9, 1e-6])('proves nothing for K above the truth by %f', (step) => {
    expect(failing({ ...enclosed, bound: 2 * Math.cosh(0.5) + step })).toBe('left form');
  });

  it('claims no grade that it does not reach', () => {
    expect(failing({ ...enclosed, grade: 'exact', bound: 2 * Math.cosh(0.5) + 1e-15 })).toBe('left form');
    expect(failing({ ...rounded, grade: 'enclosed' })).toBe('σWσ⁻¹ = W/ratio for every jump');
  });

  it.each([0, 1, 2, 3, 4, 5])('is refused with coefficient %i off by 2^-100', (t) => {
    const edited = withTerms(enclosed, (term, u) => (u === t ? { ...term, re: plus(term.re, 2 ** -100) } : term));
    expect(failing(edited)).toBe('∂L = L̂∂ on every matrix unit');
  });

  it('is refused with a ratio or a rate off by 2^-100', () => {
    expect(failing(withJump(enclosed, { ratio: plus(enclosed.jumps[0].ratio, 2 ** -100) }))).toBe('σWσ⁻¹ = W/ratio for every jump'); // prettier-ignore
    expect(failing(withJump(enclosed, { rate: plus(enclosed.jumps[0].rate, 2 ** -100) }))).toBe(
      'partners are adjoints',
    );
  });

  it('is refused when the model differs by 1e-12', () => {
    expect(failing(enclosed, thermalQubit({ beta: 1 + 1e-12 }))).toBe(
      'L from the jumps, against the doubles of the model',
    );
  });
});
