/** √x, correctly rounded as IEEE 754 asks of every engine. Throws for x < 0 and for NaN. */
export function sqrt(x: number): number {
  if (!(x >= 0)) throw new RangeError(`expected sqrt of a number of at least 0, got ${x}`);
  return Math.sqrt(x);
}
