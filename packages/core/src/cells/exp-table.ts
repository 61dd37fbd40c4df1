import { expDifference } from '../checker/arithmetic/exp-difference.js';
import { type Interval, point } from '../checker/arithmetic/interval.js';

/** exp[0,…,0,x,…,x], the number of zeros and of arguments x given: increasing in x. */
export type ExpTable = (zeros: number, repeats: number, x: Interval) => Interval;

/** The function with its values at points kept: cells share their corners with their neighbours. */
export function expTable(): ExpTable {
  const known = new Map<number, Map<number, Interval>>();
  const at = (zeros: number, repeats: number, x: number): Interval => {
    const key = ARGUMENTS * zeros + repeats;
    const values = known.get(key) ?? new Map<number, Interval>();
    known.set(key, values);
    const found = values.get(x);
    if (found) return found;
    const value = atPoint(zeros, repeats, x);
    values.set(x, value);
    return value;
  };
  return (zeros, repeats, x) => {
    const low = at(zeros, repeats, x.lo);
    return x.lo === x.hi ? low : { lo: low.lo, hi: at(zeros, repeats, x.hi).hi };
  };
}

/** More than there are arguments of one kind. */
const ARGUMENTS = 8;

function atPoint(zeros: number, repeats: number, x: number): Interval {
  const end: Interval = { lo: x, hi: x };
  return expDifference([...new Array<Interval>(zeros).fill(point(0)), ...new Array<Interval>(repeats).fill(end)]);
}
