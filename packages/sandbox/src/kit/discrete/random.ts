import { log } from '../functions/logarithm.js';
import { requireWhole } from '../require.js';

/** A sequence of pseudo-random numbers that its seed alone decides. */
export interface Random {
  /** Uniform on [0, 1), a multiple of 2^-53. */
  uniform(): number;
  /** Standard normal. */
  normal(): number;
  /** Uniform on {0, …, n − 1}, 1 ≤ n ≤ 2^32. */
  integer(n: number): number;
}

/**
 * xoshiro128** (Blackman & Vigna, ACM Trans. Math. Softw. 47 (2021)) seeded from a number or a text. Not core's generator: a
 * published example must get the same numbers from the same kit for ever, on every engine, by the kit's own logarithm.
 */
export function random(seed: number | string): Random {
  const state = expandSeed(String(seed));
  let spare: number | null = null;
  const uniform = (): number => {
    const high = step(state) >>> 5;
    return (high * 67108864 + (step(state) >>> 6)) / 9007199254740992;
  };
  /** Polar method of Marsaglia. */
  const normal = (): number => {
    const kept = spare;
    spare = null;
    if (kept !== null) return kept;
    for (;;) {
      const x = 2 * uniform() - 1;
      const y = 2 * uniform() - 1;
      const s = x * x + y * y;
      if (s >= 1 || s <= 0) continue;
      const factor = Math.sqrt((-2 * log(s)) / s);
      spare = y * factor;
      return x * factor;
    }
  };
  const integer = (n: number): number => {
    requireWhole(n, 1, 4294967296, 'the range');
    // The incomplete last interval is rejected, so that no value is favoured.
    const limit = 4294967296 - (4294967296 % n);
    for (;;) {
      const value = step(state);
      if (value < limit) return value % n;
    }
  };
  return Object.freeze({ uniform, normal, integer });
}

function step(s: Int32Array): number {
  const product = Math.imul(s[1], 5);
  const result = Math.imul((product << 7) | (product >>> 25), 9) >>> 0;
  const t = s[1] << 9;
  s[2] ^= s[0];
  s[3] ^= s[1];
  s[1] ^= s[2];
  s[0] ^= s[3];
  s[2] ^= t;
  s[3] = (s[3] << 11) | (s[3] >>> 21);
  return result;
}

/** FNV-1a over the UTF-16 units, then four outputs of a Weyl sequence with the finaliser of MurmurHash3: never all zero. */
function expandSeed(text: string): Int32Array {
  let hash = 0x811c9dc5;
  for (let i = 0; i < text.length; i++) {
    const unit = text.charCodeAt(i);
    hash = Math.imul(hash ^ (unit & 0xff), 0x01000193);
    hash = Math.imul(hash ^ (unit >>> 8), 0x01000193);
  }
  const state = new Int32Array(4);
  for (let i = 0; i < 4; i++) {
    hash = (hash + 0x9e3779b9) | 0;
    let z = hash;
    z = Math.imul(z ^ (z >>> 16), 0x85ebca6b);
    z = Math.imul(z ^ (z >>> 13), 0xc2b2ae35);
    state[i] = z ^ (z >>> 16);
  }
  return state;
}
