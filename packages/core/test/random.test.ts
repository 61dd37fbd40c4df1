import { describe, expect, it } from 'vitest';
import { seededRandom } from '../src/random.js';
import { expectClose } from './linalg/support/expect-close.js';

describe('seededRandom', () => {
  it('gives the same sequence for the same seed, and another for another', () => {
    const take = (seed: number | string): number[] => {
      const random = seededRandom(seed);
      return [random.uniform(), random.normal(), random.normal(), random.integer(1000), random.uniform()];
    };
    expect(take(1)).toEqual(take(1));
    expect(take(1)).toEqual(take('1'));
    expect(new Set([take(1)[0], take(2)[0], take('')[0], take('a')[0], take('ab')[0], take('ba')[0]]).size).toBe(6);
  });

  it('never changes: recorded results depend on it', () => {
    const random = seededRandom(1);
    const first = [random.uniform(), random.uniform(), random.normal(), random.integer(10)];
    expect(first).toEqual([0.7656377809813851, 0.31176096404466125, 1.091883397121392, 6]);
  });

  it('follows xoshiro128** word for word', () => {
    // The state is read off a stream of 32-bit words through an independent implementation in big integers.
    const random = seededRandom('words');
    const words = Array.from({ length: 2000 }, () => BigInt(random.integer(4294967296)));
    const solved = stateBefore(words);
    for (const word of words.slice(4)) expect(word).toBe(nextWord(solved));
  });

  it('is uniform on [0, 1) in mean, variance, bins and successive pairs', () => {
    const random = seededRandom('uniform');
    const n = 200000;
    const bins = new Float64Array(100);
    let [sum, squares, products, outside] = [0, 0, 0, 0];
    let previous = 0.5;
    for (let i = 0; i < n; i++) {
      const x = random.uniform();
      if (!(x >= 0 && x < 1)) outside++;
      sum += x;
      squares += (x - 0.5) ** 2;
      products += (x - 0.5) * (previous - 0.5);
      bins[Math.floor(100 * x)]++;
      previous = x;
    }
    expect(outside).toBe(0);
    // Five standard deviations each.
    expectClose(sum / n, 0.5, 5 * Math.sqrt(1 / 12 / n), 'mean');
    expectClose(squares / n, 1 / 12, 5 * Math.sqrt(1 / 180 / n), 'variance');
    expectClose(products / n, 0, 5 / 12 / Math.sqrt(n), 'serial covariance');
    const chi = bins.reduce((total, count) => total + (count - n / 100) ** 2 / (n / 100), 0);
    expectClose(chi, 99, 5 * Math.sqrt(2 * 99), 'chi-squared of 100 bins');
  });

  it('is normal in its first four moments and its tails', () => {
    const random = seededRandom('normal');
    const n = 200000;
    const moments = [0, 0, 0, 0];
    let tail = 0;
    for (let i = 0; i < n; i++) {
      const x = random.normal();
      moments.forEach((_, k) => (moments[k] += x ** (k + 1) / n));
      if (Math.abs(x) > 1.959963984540054) tail++;
    }
    expectClose(moments[0], 0, 5 / Math.sqrt(n), 'mean');
    expectClose(moments[1], 1, 5 * Math.sqrt(2 / n), 'variance');
    expectClose(moments[2], 0, 5 * Math.sqrt(15 / n), 'third moment');
    expectClose(moments[3], 3, 5 * Math.sqrt(96 / n), 'fourth moment');
    expectClose(tail / n, 0.05, 5 * Math.sqrt((0.05 * 0.95) / n), 'share beyond 1.96');
  });

  it('favours no integer, also where 2^32 is not a multiple', () => {
    const random = seededRandom('integer');
    const n = 70000;
    const counts = new Float64Array(7);
    for (let i = 0; i < n; i++) counts[random.integer(7)]++;
    for (const count of counts) expectClose(count / n, 1 / 7, 5 * Math.sqrt(6 / 49 / n), 'share');
    // A third of 3·2^30 is what a plain remainder would favour.
    let low = 0;
    for (let i = 0; i < n; i++) if (random.integer(3 * 2 ** 30) < 2 ** 30) low++;
    expectClose(low / n, 1 / 3, 5 * Math.sqrt(2 / 9 / n), 'share of the lower third');
    expect(random.integer(1)).toBe(0);
  });

  it('refuses impossible ranges', () => {
    const random = seededRandom(0);
    for (const n of [0, -1, 1.5, NaN, 2 ** 33]) {
      expect(() => random.integer(n)).toThrow(expect.objectContaining({ code: 'usage' }));
    }
  });
});

type State = [bigint, bigint, bigint, bigint];

const MASK = 0xffffffffn;

function rotate(x: bigint, k: bigint): bigint {
  return ((x << k) | (x >> (32n - k))) & MASK;
}

/** xoshiro128** 1.1 of Blackman & Vigna, transcribed from the paper. */
function nextWord(s: State): bigint {
  const result = (rotate((s[1] * 5n) & MASK, 7n) * 9n) & MASK;
  const t = (s[1] << 9n) & MASK;
  s[2] ^= s[0];
  s[3] ^= s[1];
  s[1] ^= s[2];
  s[0] ^= s[3];
  s[2] ^= t;
  s[3] = rotate(s[3], 11n);
  return result;
}

/**
 * The scrambler is a bijection of s1, so four words give s1 at four successive steps. With a, b, c, d these: the update
 * is s1' = s1 ^ s2 ^ s0 and s2' = s2 ^ s0 ^ (s1 << 9), so s2' = a ^ b ^ (a << 9), and likewise one step on; s0'' and s0'
 * follow from s1'' = s1' ^ s2' ^ s0', and s3' from s0'' = s0' ^ s3' ^ s1'. Returns the state after four words.
 */
function stateBefore(words: readonly bigint[]): State {
  const [a, b, c, d] = words.slice(0, 4).map(unscramble);
  const s2 = a ^ b ^ ((a << 9n) & MASK);
  const s0 = b ^ s2 ^ c;
  const next2 = b ^ c ^ ((b << 9n) & MASK);
  const next0 = c ^ next2 ^ d;
  const s3 = s0 ^ next0 ^ b;
  const state: State = [s0, b, s2, s3];
  for (let i = 0; i < 3; i++) nextWord(state);
  return state;
}

function unscramble(word: bigint): bigint {
  return (rotate((word * inverse(9n)) & MASK, 25n) * inverse(5n)) & MASK;
}

/** Inverse modulo 2^32 of an odd number, by Newton's iteration. */
function inverse(x: bigint): bigint {
  let y = 1n;
  for (let i = 0; i < 6; i++) y = (y * (2n - x * y)) & MASK;
  return y;
}
