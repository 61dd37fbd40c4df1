/** A number of at most `digits` significant digits, trailing zeros dropped, a true minus sign, powers of ten as such. */
export function numberText(value: number, digits = 5): string {
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e-4 && size < 1e6) return minus(String(Number(value.toPrecision(digits))));
  const [mantissa = '', exponent = '0'] = value.toExponential(digits - 1).split('e');
  const power = `10^{${minus(String(Number(exponent)))}}`;
  const front = minus(String(Number(mantissa)));
  return front === '1' ? power : `${front}·${power}`;
}

/** Labels of the ticks of one axis: as many decimals as tell them apart. */
export function tickTexts(ticks: readonly number[]): string[] {
  const top = Math.max(...ticks.map(Math.abs));
  if (top >= 1e6 || (top > 0 && top < 1e-3)) return ticks.map((tick) => numberText(tick, 3));
  const step = ticks.length > 1 ? Math.abs((ticks[1] ?? 0) - (ticks[0] ?? 0)) : 1;
  const decimals = Math.max(0, Math.min(8, -Math.floor(Math.log10(step) + 1e-9)));
  return ticks.map((tick) => minus(String(Number(tick.toFixed(decimals)))));
}

function minus(text: string): string {
  return text.replace('-', '−');
}
