/** Significant digits of numbers that stand in lists. */
const DIGITS = 7;

/** Scales outside of these are written with an exponent. */
const SMALLEST_FIXED = 1e-3;
const LARGEST_FIXED = 1e7;

/** Below this part of the scale a number is the rounding of zero. */
const ROUNDING = 1e-12;

/**
 * A number among others of the size `scale`: as many decimals as give the largest seven significant digits, a true minus sign,
 * 0 for what is below `rounding` times the scale, an exponent where decimals would show nothing.
 */
export function listNumber(value: number, scale: number, rounding = ROUNDING): string {
  if (Math.abs(value) <= rounding * scale) return '0';
  if (scale < SMALLEST_FIXED || scale >= LARGEST_FIXED) return minus(value.toExponential(DIGITS - 1));
  const decimals = Math.max(0, DIGITS - 1 - Math.max(0, Math.floor(Math.log10(scale))));
  const fixed = value.toFixed(decimals);
  return minus(/[1-9]/.test(fixed) ? fixed : value.toExponential(1));
}

/** The size of a list: its largest modulus. */
export function scaleOf(values: Iterable<number>): number {
  let scale = 0;
  for (const value of values) scale = Math.max(scale, Math.abs(value));
  return scale;
}

/** Three significant digits: for residuals and margins. */
export function shortNumber(value: number): string {
  if (value === 0) return '0';
  const size = Math.abs(value);
  return minus(size >= 1e-3 && size < 1e4 ? value.toPrecision(3) : value.toExponential(1));
}

/** True minus signs, and no plus in exponents. */
export function minus(text: string): string {
  return text.replace('e+', 'e').replaceAll('-', '−');
}
