import { shorten } from '../describe-value.js';

const WHITE_SPACE = /[ \t\n\r]*/y;
const WORD = /[\p{L}\p{N}_+.-]+/uy;

/** A position in a text, moved by matching. */
export class TextScanner {
  readonly text: string;
  position = 0;

  constructor(text: string) {
    this.text = text;
  }

  /** The character at the position; undefined at the end. */
  get next(): string | undefined {
    return this.text[this.position];
  }

  /** Moves past what a sticky pattern matches here and returns it; the empty text where it does not match. */
  match(pattern: RegExp): string {
    pattern.lastIndex = this.position;
    const found = pattern.exec(this.text)?.[0] ?? '';
    this.position += found.length;
    return found;
  }

  /** Moves past letters, digits and signs: what a reader sees as one word. */
  word(): string {
    return this.match(WORD);
  }

  /** Moves past white space and, if it comes next, the character. */
  take(character: string): boolean {
    this.skipSpace();
    if (this.next !== character) return false;
    this.position++;
    return true;
  }

  skipSpace(): void {
    if (this.text.charCodeAt(this.position) <= 32) this.match(WHITE_SPACE);
  }

  /** A few words for what stands at the position. */
  found(): string {
    const start = this.position;
    if (start >= this.text.length) return 'the end of the text';
    const word = this.word();
    this.position = start;
    return word === '' ? JSON.stringify(String.fromCodePoint(this.text.codePointAt(start) ?? 0)) : shorten(word);
  }

  /** Line and column of an offset, counted from 1, in UTF-16 units. */
  place(offset: number): { line: number; column: number } {
    const before = this.text.slice(0, offset);
    return { line: before.split('\n').length, column: offset - before.lastIndexOf('\n') };
  }
}
