/** Pads texts so that their decimal points stand under each other; texts without digits are set right of the whole parts. */
export function decimalColumn(texts: readonly string[]): string[] {
  const split = texts.map(splitAtPoint);
  const whole = Math.max(0, ...split.map(([left]) => left.length));
  const rest = Math.max(0, ...split.map(([, right]) => right.length));
  return split.map(([left, right]) => left.padStart(whole) + right.padEnd(rest));
}

function splitAtPoint(text: string): [string, string] {
  const point = text.indexOf('.');
  return point < 0 ? [text, ''] : [text.slice(0, point), text.slice(point)];
}
