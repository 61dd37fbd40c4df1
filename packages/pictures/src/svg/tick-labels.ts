import { TYPE, textWidth } from './text.js';

/** Pixels kept free between two labels of an axis. */
const GAP = 6;

/** The labels of a horizontal axis, centred at their ticks: those that would meet the one before, or leave [left, right], are dropped. */
export function tickLabels(
  ticks: readonly { readonly x: number; readonly text: string }[],
  [left, right]: readonly [number, number],
): { readonly x: number; readonly text: string }[] {
  let taken = left - GAP;
  return ticks.filter(({ x, text }) => {
    const half = textWidth(text, TYPE.small) / 2;
    if (x - half < taken + GAP || x + half > right) return false;
    taken = x + half;
    return true;
  });
}
