/** Binary floating point over BigInt for reference values: m·2^e, mantissas cut to PRECISION bits after each operation. */
export interface BigFloat {
  readonly m: bigint;
  readonly e: number;
}

const PRECISION = 700;

export function big(x: number): BigFloat {
  if (x === 0) return { m: 0n, e: 0 };
  let e = 0;
  let y = x;
  // Steps by powers of two are exact in both directions as long as subnormals are only multiplied upwards.
  while (!Number.isInteger(y)) {
    y *= 2;
    e--;
  }
  return { m: BigInt(y), e };
}

function cut({ m, e }: BigFloat): BigFloat {
  const extra = bitLength(m) - PRECISION;
  return extra > 0 ? { m: m >> BigInt(extra), e: e + extra } : { m, e };
}

export function plus(a: BigFloat, b: BigFloat): BigFloat {
  if (a.m === 0n) return b;
  if (b.m === 0n) return a;
  const [high, low] = a.e >= b.e ? [a, b] : [b, a];
  const gap = high.e - low.e;
  // Far below the last bit of the other: it cannot matter at this precision.
  if (gap > 4 * PRECISION + bitLength(low.m)) return high;
  return cut({ m: (high.m << BigInt(gap)) + low.m, e: low.e });
}

export function negative(a: BigFloat): BigFloat {
  return { m: -a.m, e: a.e };
}

export function minus(a: BigFloat, b: BigFloat): BigFloat {
  return plus(a, negative(b));
}

export function times(a: BigFloat, b: BigFloat): BigFloat {
  return cut({ m: a.m * b.m, e: a.e + b.e });
}

export function over(a: BigFloat, b: BigFloat): BigFloat {
  const shift = PRECISION + bitLength(b.m) + 2;
  return cut({ m: (a.m << BigInt(shift)) / b.m, e: a.e - b.e - shift });
}

export function compare(a: BigFloat, b: BigFloat): number {
  const d = minus(a, b).m;
  return d > 0n ? 1 : d < 0n ? -1 : 0;
}

export function bigSqrt(a: BigFloat): BigFloat {
  if (a.m === 0n) return a;
  let shift = 2 * PRECISION;
  if ((a.e - shift) % 2 !== 0) shift++;
  const n = a.m << BigInt(shift);
  let x = 1n << BigInt((bitLength(n) >> 1) + 1);
  for (;;) {
    const next = (x + n / x) >> 1n;
    if (next >= x) break;
    x = next;
  }
  return cut({ m: x, e: (a.e - shift) / 2 });
}

/** log of a positive number: relative accuracy near 1 too. */
export function bigLog(a: BigFloat): BigFloat {
  const k = bitLength(a.m) + a.e;
  let f: BigFloat = { m: a.m, e: a.e - k }; // in [1/2, 1)
  let shift = k;
  if (toNumber(f) < Math.SQRT1_2) {
    f = { m: f.m, e: f.e + 1 };
    shift--;
  }
  const one = big(1);
  const rest = artanhTwice(over(minus(f, one), plus(f, one)));
  return shift === 0 ? rest : plus(rest, times(big(shift), LN2));
}

export function bigExp(a: BigFloat): BigFloat {
  const k = Math.round(toNumber(a) * Math.LOG2E);
  const r = minus(a, times(big(k), LN2));
  const halvings = 10;
  const step: BigFloat = { m: r.m, e: r.e - halvings };
  let term = big(1);
  let sum = big(1);
  for (let n = 1; n < 80; n++) {
    term = over(times(term, step), big(n));
    sum = plus(sum, term);
  }
  for (let n = 0; n < halvings; n++) sum = times(sum, sum);
  return { m: sum.m, e: sum.e + k };
}

/** Nearest double, up to an ulp; for sizes and messages only. */
export function toNumber({ m, e }: BigFloat): number {
  const extra = Math.max(0, bitLength(m) - 60);
  let x = Number(m >> BigInt(extra));
  let k = e + extra;
  for (; k > 0; k -= 500) x *= 2 ** Math.min(k, 500);
  for (; k < 0; k += 500) x *= 2 ** Math.max(k, -500);
  return x;
}

function bitLength(m: bigint): number {
  const text = (m < 0n ? -m : m).toString(16);
  return text === '0' ? 0 : 4 * (text.length - 1) + (32 - Math.clz32(parseInt(text[0], 16)));
}

const LN2 = artanhTwice(over(big(1), big(3)));

function artanhTwice(t: BigFloat): BigFloat {
  const s = times(t, t);
  let power = big(1);
  let sum = big(1);
  for (let k = 1; k < PRECISION && power.m !== 0n && bitLength(power.m) + power.e > -PRECISION - 20; k++) {
    power = times(power, s);
    sum = plus(sum, over(power, big(2 * k + 1)));
  }
  return times(times(big(2), t), sum);
}
