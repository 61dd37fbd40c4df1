import type { Bracket } from './bracket.js';

/** The ends of a bracket as text; equal when the bracket is closed, null where an end is missing. */
export interface BracketText {
  readonly lower: string | null;
  readonly upper: string | null;
}

interface Shown {
  readonly value: number | null;
  readonly margin?: number | undefined;
}

/**
 * Decimal text of a bracket's ends with no more digits than it supports. Closed: one number, its last digit worth no less
 * than the width, ten significant ones at most. Open: seven significant digits, the lower end rounded down and the upper one
 * up, save that an end within twice its margin (value ± margin is what was computed) of a shorter decimal is shown as that.
 */
export function bracketText(
  lower: Bracket['lower'] | Shown,
  upper: Bracket['upper'] | Shown,
  closed: boolean,
  infinite: { readonly lower: string; readonly upper: string } = { lower: '−∞', upper: '∞' },
): BracketText {
  const low = valueOf(lower, -Infinity);
  const high = valueOf(upper, Infinity);
  if (closed && low !== null && high !== null && Number.isFinite(low) && Number.isFinite(high)) {
    const text = commonText(low, high);
    return { lower: text, upper: text };
  }
  return {
    lower: low === null ? null : outwardText(low, lower?.margin ?? 0, Math.floor, infinite),
    upper: high === null ? null : outwardText(high, upper?.margin ?? 0, Math.ceil, infinite),
  };
}

/** A null value in a written end stands for an unbounded one. */
function valueOf(end: Shown | null, unbounded: number): number | null {
  if (!end) return null;
  return end.value ?? unbounded;
}

const CLOSED_DIGITS = 10;
const OPEN_DIGITS = 7;

function commonText(low: number, high: number): string {
  const middle = (low + high) / 2;
  const most = decimalsFor(middle, CLOSED_DIGITS);
  const width = Math.abs(high - low);
  const decimals = width > 0 ? Math.min(most, Math.floor(-Math.log10(width))) : most;
  return signed(middle.toFixed(Math.max(0, decimals)));
}

function outwardText(
  value: number,
  margin: number,
  outward: (x: number) => number,
  infinite: { readonly lower: string; readonly upper: string },
): string {
  if (value === -Infinity) return infinite.lower;
  if (value === Infinity) return infinite.upper;
  const decimals = decimalsFor(value, OPEN_DIGITS);
  const unit = 10 ** decimals;
  const scaled = value * unit;
  const nearest = Math.round(scaled);
  const snap = 2 * margin * unit + 4e-16 * Math.abs(scaled);
  const rounded = Math.abs(scaled - nearest) <= snap ? nearest : outward(scaled);
  return signed((rounded / unit).toFixed(decimals));
}

/** Decimals that give a number the wanted count of significant digits, 0 to 12. */
function decimalsFor(value: number, digits: number): number {
  const size = Math.abs(value);
  const whole = size >= 1 ? Math.floor(Math.log10(size)) + 1 : 1;
  return Math.max(0, Math.min(12, digits - whole));
}

/** A true minus sign, and no minus zero. */
function signed(text: string): string {
  if (!text.startsWith('-')) return text;
  return /[1-9]/.test(text) ? `−${text.slice(1)}` : text.slice(1);
}
