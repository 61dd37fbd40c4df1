/** A few words for what came, fit for "expected …, got …". */
export function describeValue(value: unknown): string {
  if (value === undefined) return 'nothing';
  if (value === null) return 'null';
  if (typeof value === 'string') return `the text ${JSON.stringify(shorten(value))}`;
  if (Array.isArray(value)) return value.length === 0 ? 'an empty list' : `a list of ${value.length}`;
  if (typeof value === 'object') return describeObject(Object.keys(value));
  return typeof value === 'number' || typeof value === 'boolean' ? String(value) : `a ${typeof value}`;
}

export function shorten(text: string, length = 40): string {
  return text.length > length ? `${text.slice(0, length)}…` : text;
}

/** "1 entry", "3 entries". */
export function count(n: number, singular: string, plural = `${singular}s`): string {
  return `${n} ${n === 1 ? singular : plural}`;
}

function describeObject(keys: string[]): string {
  if (keys.length === 0) return 'an empty object';
  const shown = keys.slice(0, 4).map((key) => JSON.stringify(shorten(key, 20)));
  return `an object with ${shown.join(', ')}${keys.length > 4 ? ', …' : ''}`;
}
