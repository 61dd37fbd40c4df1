import { type Interval, ONE, ZERO, add, div, mul, neg, point, sqr, sub } from '../checker/arithmetic/interval.js';
import type { ExpTable } from './exp-table.js';

/** A smooth function over a cell of parameters: where it is, its value at the centre, its partial derivatives over the cell. */
export interface Jet {
  readonly range: Interval;
  readonly centre: Interval;
  /** One enclosure a parameter. */
  readonly slopes: readonly Interval[];
}

export function constantJet(value: Interval, parameters: number): Jet {
  return { range: value, centre: value, slopes: new Array<Interval>(parameters).fill(ZERO) };
}

export function addJet(a: Jet, b: Jet): Jet {
  if (isZero(a)) return b;
  if (isZero(b)) return a;
  return {
    range: add(a.range, b.range),
    centre: add(a.centre, b.centre),
    slopes: a.slopes.map((s, k) => add(s, b.slopes[k])),
  };
}

export function subJet(a: Jet, b: Jet): Jet {
  return {
    range: sub(a.range, b.range),
    centre: sub(a.centre, b.centre),
    slopes: a.slopes.map((s, k) => sub(s, b.slopes[k])),
  };
}

export function negJet(a: Jet): Jet {
  return { range: neg(a.range), centre: neg(a.centre), slopes: a.slopes.map(neg) };
}

export function mulJet(a: Jet, b: Jet): Jet {
  if (isZero(a)) return a;
  if (isZero(b)) return b;
  return {
    range: mul(a.range, b.range),
    centre: mul(a.centre, b.centre),
    slopes: a.slopes.map((s, k) => add(mul(s, b.range), mul(a.range, b.slopes[k]))),
  };
}

/** Identically zero, as its range shows. */
function isZero({ range }: Jet): boolean {
  return range.lo === 0 && range.hi === 0;
}

/** a². */
export function squareJet(a: Jet): Jet {
  return {
    range: sqr(a.range),
    centre: sqr(a.centre),
    slopes: a.slopes.map((s) => mul(s, add(a.range, a.range))),
  };
}

/** A function known not to be negative. */
export function positiveJet(a: Jet): Jet {
  return { ...a, range: { lo: Math.max(0, a.range.lo), hi: Math.max(0, a.range.hi) } };
}

/** The product with a number that does not depend on the parameters. */
export function scaleJet(a: Jet, factor: Interval): Jet {
  return { range: mul(a.range, factor), centre: mul(a.centre, factor), slopes: a.slopes.map((s) => mul(s, factor)) };
}

/** exp[0,…,0,z,…,z], `zeros` times 0 and `repeats` ≥ 1 times z; the derivative is repeats·exp[0,…,0,z,…,z,z]. */
export function expDifferenceJet(table: ExpTable, zeros: number, repeats: number, z: Jet): Jet {
  return throughJet(z, (x) => table(zeros, repeats, x), mul(point(repeats), table(zeros, repeats + 1, z.range)));
}

function throughJet(z: Jet, f: (x: Interval) => Interval, slope: Interval): Jet {
  return { range: f(z.range), centre: f(z.centre), slopes: z.slopes.map((s) => mul(s, slope)) };
}

/** 1/z for a function that keeps its sign. */
export function reciprocalJet(z: Jet): Jet {
  return throughJet(z, (x) => div(ONE, x), neg(div(ONE, sqr(z.range))));
}

/**
 * A factor of a positive form, made smaller: its lower end over the cell where it varies more than twofold, for there a mean value
 * would say little.
 */
export function loweredJet(a: Jet): { readonly jet: Jet; readonly exact: boolean } {
  if (a.range.lo >= a.range.hi / 2) return { jet: a, exact: true };
  const least = point(Math.max(a.range.lo, -Number.MAX_VALUE));
  return { jet: constantJet(least, a.slopes.length), exact: false };
}
