import { ThalwegError } from '@thalweg/core';

export type Attributes = Readonly<Record<string, string | number | undefined>>;

/** An SVG element as text; numbers are rounded to hundredths of a pixel. Throws `internal` for a number that is not finite. */
export function element(name: string, attributes: Attributes, ...children: readonly string[]): string {
  const written = Object.entries(attributes).flatMap(([key, value]) =>
    value === undefined ? [] : [` ${key}="${typeof value === 'number' ? coordinate(value) : escapeText(value)}"`],
  );
  const open = `<${name}${written.join('')}`;
  return children.length === 0 ? `${open}/>` : `${open}>${children.join('')}</${name}>`;
}

/** Text content and attribute values. Characters that XML forbids become spaces. */
export function escapeText(text: string): string {
  return text
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
    .replace(FORBIDDEN, ' ');
}

/** Control characters, lone surrogates and non-characters (XML 1.0, §2.2). */
const FORBIDDEN = /[^\t\n\r\u{20}-\u{D7FF}\u{E000}-\u{FFFD}\u{10000}-\u{10FFFF}]/gu;

/** A coordinate in pixels, to hundredths. */
export function coordinate(value: number): string {
  if (!Number.isFinite(value)) {
    throw new ThalwegError('internal', `expected a finite coordinate in a picture, got ${value}; report the data`);
  }
  const rounded = Math.round(value * 100) / 100;
  return String(rounded + 0);
}

/** `M x,y L …`, closed with Z where asked for. */
export function pathData(points: readonly (readonly [number, number])[], closed = false): string {
  const parts = points.map(([x, y], k) => `${k === 0 ? 'M' : 'L'}${coordinate(x)},${coordinate(y)}`);
  return parts.join('') + (closed ? 'Z' : '');
}
