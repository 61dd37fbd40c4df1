import { expect } from 'vitest';
import { type Interval } from '../../../src/checker/arithmetic/interval.js';
import { type BigFloat, big, compare, minus, over, plus, times, toNumber } from './big-float.js';

const SLIP: BigFloat = { m: 1n, e: -400 };

/** Fails unless lo ≤ reference ≤ hi; the reference may be off by 2^-400 relative. */
export function expectEnclosed(x: Interval, reference: BigFloat, what: string): void {
  const slack = times(SLIP, reference.m < 0n ? { m: -reference.m, e: reference.e } : reference);
  const ok =
    (x.lo === -Infinity || compare(big(x.lo), plus(reference, slack)) <= 0) &&
    (x.hi === Infinity || compare(minus(reference, slack), big(x.hi)) <= 0);
  expect(ok, `${what}: expected [${x.lo}, ${x.hi}] to contain ${toNumber(reference)}`).toBe(true);
}

/** (hi − lo)/|reference|, 0 for a point. */
export function relativeWidth(x: Interval, reference: BigFloat): number {
  if (x.lo === x.hi) return 0;
  return Math.abs(toNumber(over(minus(big(x.hi), big(x.lo)), reference)));
}

/** A deterministic mixture of doubles > 0: ordinary, huge ratios, neighbours, subnormals. */
export function positiveSamples(random: { uniform(): number; integer(n: number): number }, count: number): number[] {
  const out: number[] = [];
  const scales = [0, 0, 0.01, 1, 20, 300, 690];
  for (let k = 0; k < count; k++) {
    const scale = scales[random.integer(scales.length)];
    out.push(Math.exp(scale * (2 * random.uniform() - 1)));
  }
  return out;
}

/** The double next to x > 0, `steps` units in the last place away. */
export function neighbour(x: number, steps: number): number {
  const bits = new BigInt64Array(new Float64Array([x]).buffer);
  bits[0] += BigInt(steps);
  return new Float64Array(bits.buffer)[0];
}
