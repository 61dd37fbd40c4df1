import { DOMParser, type Document, type Element } from '@xmldom/xmldom';
import { expect } from 'vitest';

/** A picture as a DOM; anything that is not well-formed XML fails. */
function parsePicture(svg: string): Document {
  const complaints: string[] = [];
  const parser = new DOMParser({ onError: (level, message) => complaints.push(`${level}: ${message}`) });
  const document = parser.parseFromString(svg, 'image/svg+xml');
  expect(complaints).toEqual([]);
  return document;
}

export function elementsOf(document: Document, name: string): Element[] {
  return Array.from(document.getElementsByTagName(name));
}

/** A line of text as a rectangle turned about the point it is set at. */
export interface TextBox {
  readonly text: string;
  readonly corners: readonly (readonly [number, number])[];
}

/** Width of a character of a monospaced face, in units of its size. */
const CHARACTER = 0.6;

/** Where the letters of every text stand, computed from the attributes alone. */
export function textBoxes(document: Document): TextBox[] {
  return elementsOf(document, 'text').map((element) => {
    const number = (name: string) => Number(element.getAttribute(name));
    const [x, y, size] = [number('x'), number('y'), number('font-size')];
    const text = element.textContent ?? '';
    const width = [...text].length * CHARACTER * size;
    const anchor = element.getAttribute('text-anchor') ?? 'start';
    const left = anchor === 'end' ? x - width : anchor === 'middle' ? x - width / 2 : x;
    const turn = Number(/^rotate\((\S+) /.exec(element.getAttribute('transform') ?? '')?.[1] ?? 0);
    const angle = (turn * Math.PI) / 180;
    const at = (u: number, v: number): readonly [number, number] => {
      const [dx, dy] = [u - x, v - y];
      return [x + dx * Math.cos(angle) - dy * Math.sin(angle), y + dx * Math.sin(angle) + dy * Math.cos(angle)];
    };
    // Letters reach three quarters of the size above the baseline and a fifth below it.
    const [top, bottom] = [y - 0.75 * size, y + 0.2 * size];
    const corners = [at(left, top), at(left + width, top), at(left + width, bottom), at(left, bottom)];
    return { text, corners };
  });
}

/** Pairs of texts whose letters meet: convex outlines that no side of either separates. */
function collisions(boxes: readonly TextBox[]): string[] {
  const found: string[] = [];
  boxes.forEach((a, k) => {
    for (const b of boxes.slice(k + 1)) if (!separated(a, b)) found.push(`"${a.text}" and "${b.text}"`);
  });
  return found;
}

function separated(a: TextBox, b: TextBox): boolean {
  return [a, b].some(({ corners }) =>
    corners.some(([x, y], k) => {
      const [nextX, nextY] = corners[(k + 1) % corners.length] ?? [x, y];
      const [nx, ny] = [nextY - y, x - nextX];
      const spans = [a, b].map((box) => box.corners.map(([u, v]) => u * nx + v * ny));
      const [first = [], second = []] = spans;
      return Math.max(...first) <= Math.min(...second) || Math.max(...second) <= Math.min(...first);
    }),
  );
}

/** Well-formed, finite, inside its frame, labelled apart, with a text alternative. */
export function expectSound(svg: string): Document {
  const document = parsePicture(svg);
  const root = document.documentElement;
  expect(svg).not.toMatch(/NaN|Infinity|undefined|null/);
  for (const path of elementsOf(document, 'path')) {
    const numbers = (path.getAttribute('d') ?? '').split(/[MLZ,]+/).filter((part) => part !== '');
    expect(numbers.length).toBeGreaterThan(3);
    expect(numbers.filter((part) => !Number.isFinite(Number(part)))).toEqual([]);
  }
  const [title, description] = ['title', 'desc'].map((name) => elementsOf(document, name)[0]);
  expect(root?.getAttribute('role')).toBe('img');
  expect(root?.getAttribute('aria-labelledby')).toBe(`${title?.getAttribute('id')} ${description?.getAttribute('id')}`);
  expect(title?.textContent).not.toBe('');
  expect(description?.textContent?.length).toBeGreaterThan(20);
  const [, , width = 0, height = 0] = (root?.getAttribute('viewBox') ?? '').split(' ').map(Number);
  const boxes = textBoxes(document);
  expect(boxes.length).toBeGreaterThan(2);
  for (const { text, corners } of boxes) {
    const inside = corners.every(([x, y]) => x >= 5 && y >= 5 && x <= width - 5 && y <= height - 5);
    expect(inside, `"${text}" inside ${width} × ${height}`).toBe(true);
  }
  expect(collisions(boxes)).toEqual([]);
  return document;
}
