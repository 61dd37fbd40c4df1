import { type Attributes, coordinate, element, escapeText } from './element.js';
import { type Colour, paint } from './palette.js';

/** Sizes of type in pixels: at a journal column of 340 px the smallest is still near 6 points. */
export const TYPE = { title: 14, text: 12, small: 11 } as const;

/** Width of a character of the monospaced face, in units of its size. */
export const CHARACTER = 0.6;

export interface TextStyle {
  readonly size?: number;
  readonly colour?: Colour;
  readonly anchor?: 'start' | 'middle' | 'end';
  readonly bold?: boolean;
  /** Degrees, clockwise, about the point. */
  readonly turn?: number;
  /** Colour of a halo that keeps lines out of the letters. */
  readonly halo?: Colour;
}

/** A line of text at a point of its baseline; `_{…}` and `^{…}` are set lower and higher. */
export function textLine(x: number, y: number, text: string, style: TextStyle = {}): string {
  const { size = TYPE.text, colour = 'ink', anchor = 'start', bold = false, turn = 0, halo } = style;
  const attributes: Attributes = {
    x,
    y,
    'font-size': size,
    ...(anchor === 'start' ? {} : { 'text-anchor': anchor }),
    ...(bold ? { 'font-weight': 700 } : {}),
    ...(turn === 0 ? {} : { transform: `rotate(${coordinate(turn)} ${coordinate(x)} ${coordinate(y)})` }),
    ...paint({ fill: colour, ...(halo && { stroke: halo }) }),
    ...(halo && { 'stroke-width': 4, 'stroke-linejoin': 'round', 'paint-order': 'stroke' }),
  };
  return element('text', attributes, ...shifted(text, size));
}

/** Width of a line in pixels. */
export function textWidth(text: string, size: number = TYPE.text): number {
  return [...plain(text)].length * CHARACTER * size;
}

/** Text without the marks of `_{…}` and `^{…}`. */
function plain(text: string): string {
  return text.replace(/[_^]\{([^}]*)\}/g, '$1');
}

/** Lines of at most `width` pixels, broken at spaces; a longer word is cut. */
function wrapText(text: string, width: number, size: number = TYPE.text): string[] {
  const room = Math.max(4, Math.floor(width / (CHARACTER * size)));
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(/\s+/).flatMap((part) => cut(part, room))) {
    const longer = line === '' ? word : `${line} ${word}`;
    if ([...plain(longer)].length <= room) line = longer;
    else {
      lines.push(line);
      line = word;
    }
  }
  return line === '' ? lines : [...lines, line];
}

function cut(word: string, room: number): string[] {
  const letters = [...word];
  if ([...plain(word)].length <= room) return [word];
  return Array.from({ length: Math.ceil(letters.length / room) }, (_, k) =>
    letters.slice(k * room, (k + 1) * room).join(''),
  );
}

/** The first lines of a wrapped text, the last of them ended by an ellipsis where more is left. */
export function firstLines(text: string, width: number, count: number, size: number = TYPE.text): string[] {
  const lines = wrapText(text, width, size);
  if (lines.length <= count) return lines;
  const room = Math.floor(width / (CHARACTER * size));
  const last = [...(lines[count - 1] ?? '')].slice(0, room - 1).join('');
  return [...lines.slice(0, count - 1), `${last.trimEnd()}…`];
}

const SHIFT = 0.28;

/** Parts set lower or higher and smaller; every shift is undone before what follows. */
function shifted(text: string, size: number): string[] {
  const parts = text.split(/([_^]\{[^}]*\})/).filter((part) => part !== '');
  let offset = 0;
  return parts.map((part) => {
    const match = /^([_^])\{([^}]*)\}$/.exec(part);
    const target = match === null ? 0 : (match[1] === '_' ? 1 : -1) * SHIFT * size;
    const dy = target - offset;
    offset = target;
    const content = escapeText(match?.[2] ?? part);
    if (dy === 0 && match === null) return content;
    return element('tspan', { dy, ...(match === null ? {} : { 'font-size': 0.75 * size }) }, content);
  });
}
