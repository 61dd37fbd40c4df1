import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { beforeAll, expect, test } from 'vitest';
import * as kit from '../../src/kit/names.js';

const SCRIPT = fileURLToPath(new URL('function_errors.py', import.meta.url));
const POINTS = 600;

/** Largest errors in units of the last place that the kit's documentation promises. */
const PROMISED: Record<string, number> = {
  exp: 1,
  expm1: 1,
  log: 1,
  log1p: 1,
  sin: 1,
  cos: 1,
  pow: 1.5,
  sinh: 2,
  cosh: 2,
  tanh: 3,
  cosOfTurn: 2,
  sinOfTurn: 2,
};

const random = kit.random('errors of functions');
const between = (a: number, b: number): number[] =>
  Array.from({ length: POINTS }, () => a + (b - a) * random.uniform());
/** Sizes from 2^a to 2^b, every power of two as likely. */
const graded = (a: number, b: number): number[] =>
  between(a, b).map((e) => 2 ** Math.floor(e) * (1 + random.uniform()));
const signed = (values: number[]): number[] => values.map((x) => (random.uniform() < 0.5 ? -x : x));

const arguments1: Record<string, number[]> = {
  exp: [...between(-744, 709.7), ...signed(graded(-30, 9)), 0, 1, -1, 0.34657359027997264],
  expm1: [...between(-50, 709), ...signed(graded(-60, 6)), 0.34657359027997264, -0.34657359027997264, 1.0397, -0.25],
  log: [...graded(-1070, 1023), ...between(0.5, 2), ...signed(graded(-50, -5)).map((x) => 1 + x), 5e-324, 1.7e308],
  log1p: [...graded(-60, 1023), ...between(-0.9999, 1), ...signed(graded(-60, -2)), 0.41421356237309515],
  sin: [...between(-524288, 524288), ...between(-7, 7), ...signed(graded(-40, 3)), 3.141592653589793, 355, 103993],
  cos: [...between(-524288, 524288), ...between(-7, 7), ...signed(graded(-40, 3)), 1.5707963267948966, 11, 344],
  sinh: [...between(-710, 710), ...signed(graded(-40, 5))],
  cosh: [...between(-710, 710), ...signed(graded(-40, 5))],
  tanh: [...between(-25, 25), ...signed(graded(-40, 3))],
};
const powers: [number, number][] = [
  ...graded(-300, 300).map((x): [number, number] => [x, 3 * random.uniform() - 1.5]),
  ...between(0, 4).map((x): [number, number] => [x, 100 * random.uniform() - 50]),
  ...signed(graded(-50, -5)).map((x): [number, number] => [1 + x, 2 ** (20 * random.uniform())]),
  [10, 308],
  [2, -1074],
];
const turns = between(1, 60).map((n): [number, number] => [random.integer(1000), Math.floor(n)]);

let errors: Record<string, [number, number[]]>;

beforeAll(() => {
  const functions = kit as unknown as Record<string, (x: number) => number>;
  const rows: Record<string, number[][]> = {
    pow: powers.map(([x, y]) => [x, y, kit.pow(x, y)]).filter(([, , value]) => value > 0 && value < Infinity),
    cosOfTurn: turns.map(([k, n]) => [k, n, kit.rootOfUnity(k, n).re]).filter((row) => Math.abs(row[2]) > 1e-20),
    sinOfTurn: turns.map(([k, n]) => [k, n, kit.rootOfUnity(k, n).im]).filter((row) => Math.abs(row[2]) > 1e-20),
  };
  for (const [name, values] of Object.entries(arguments1)) rows[name] = values.map((x) => [x, functions[name](x)]);
  const { stdout, stderr } = spawnSync('/usr/bin/python3', [SCRIPT], { input: JSON.stringify(rows), encoding: 'utf8' });
  expect(stderr).toBe('');
  errors = JSON.parse(stdout);
});

test.each(Object.entries(PROMISED))('%s is within %d units of the last place', (name, promised) => {
  const [error, at] = errors[name];
  expect(error, `largest error of ${name}, at ${at.join(', ')}`).toBeLessThanOrEqual(promised);
});

test('every function was measured, and on points where rounding shows', () => {
  expect(Object.keys(errors).sort()).toEqual(Object.keys(PROMISED).sort());
  for (const [error] of Object.values(errors)) expect(error).toBeGreaterThan(0.4);
});

test('special values', () => {
  expect([kit.exp(0), kit.exp(-Infinity), kit.exp(710), kit.exp(-746), kit.exp(NaN)]).toEqual([1, 0, Infinity, 0, NaN]);
  expect([kit.log(1), kit.log(0), kit.log(-1), kit.log(Infinity)]).toEqual([0, -Infinity, NaN, Infinity]);
  expect([kit.pow(0, 0), kit.pow(0, 2), kit.pow(0, -1), kit.pow(-2, 3), kit.pow(-2, 2)]).toEqual([
    1,
    0,
    Infinity,
    -8,
    4,
  ]);
  expect([kit.pow(10, 309), kit.pow(10, -330), kit.pow(2, 0.5), kit.pow(3, 4)]).toEqual([Infinity, 0, Math.SQRT2, 81]);
  expect([kit.tanh(0), kit.tanh(40), kit.tanh(-40), kit.expm1(-50), kit.log1p(-1)]).toEqual([0, 1, -1, -1, -Infinity]);
  expect(() => kit.sin(2 ** 20)).toThrow('expected sin of a number from −2^19 to 2^19, got 1048576');
  expect(() => kit.pow(-2, 0.5)).toThrow('expected pow of x ≥ 0 or a whole y');
  expect(() => kit.sqrt(-1)).toThrow('expected sqrt of a number of at least 0, got -1');
});

test('roots of unity have the symmetries of the circle in every bit', () => {
  for (const n of [1, 2, 3, 4, 5, 8, 12, 24]) {
    for (let k = 0; k < n; k++) {
      const z = kit.rootOfUnity(k, n);
      expect(kit.rootOfUnity(n - k, n)).toEqual({ re: z.re, im: 0 - z.im });
      expect(kit.rootOfUnity(2 * k + n, 2 * n)).toEqual({ re: 0 - z.re, im: 0 - z.im });
      expect(kit.rootOfUnity(4 * k + n, 4 * n)).toEqual({ re: 0 - z.im, im: z.re });
    }
  }
});
