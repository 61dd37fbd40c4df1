import { ThalwegError } from '@thalweg/core';
import { describeValue } from '../describe-value.js';

/** The lines of a Matrix Market file after its banner, without comments and empty lines, split into words. */
export class MtxLines {
  private readonly text: string;
  private position = 0;
  private line = 0;

  constructor(text: string) {
    this.text = text;
  }

  /** The banner: the very first line. */
  first(): string {
    return this.nextLine() ?? '';
  }

  /** Words of the next line that holds data, or null at the end. */
  next(): string[] | null {
    for (let line = this.nextLine(); line !== null; line = this.nextLine()) {
      const words = line.trim();
      if (words !== '' && !words.startsWith('%')) return words.split(/\s+/);
    }
    return null;
  }

  /** `bad-file` at the line read last. */
  fault(expected: string, got: string, advice: string): ThalwegError {
    return new ThalwegError('bad-file', `expected ${expected}, got ${got} (line ${this.line}); ${advice}`, {
      details: { line: this.line },
    });
  }

  /** Exactly as many words as named, or a fault that names them. */
  requireWords(words: string[], names: readonly string[]): void {
    if (words.length === names.length) return;
    throw this.fault(names.join(', '), describeValue(words.join(' ') || undefined), 'correct the line');
  }

  /** A finite real number in decimal. */
  real(word: string | undefined): number {
    const value = REAL.test(word ?? '') ? Number(word) : NaN;
    if (Number.isFinite(value)) return value;
    if (/^[+-]?(nan|inf|infinity)$/i.test(word ?? '') || !Number.isNaN(value)) {
      throw new ThalwegError(
        'not-finite',
        `expected finite entries, got ${word} (line ${this.line}); correct the file`,
        {
          details: { line: this.line },
        },
      );
    }
    throw this.fault('a decimal number', describeValue(word), 'write for example 1.5e-3');
  }

  /** A whole number of at least `least`. */
  whole(word: string | undefined, what: string, least = Number.MIN_SAFE_INTEGER): number {
    const value = /^[+-]?\d+$/.test(word ?? '') ? Number(word) : NaN;
    if (Number.isSafeInteger(value) && value >= least) return value;
    throw this.fault(`${what}${BOUNDS.get(least) ?? ''}`, describeValue(word), 'write a whole number');
  }

  private nextLine(): string | null {
    if (this.position >= this.text.length) return null;
    const end = this.text.indexOf('\n', this.position);
    const stop = end < 0 ? this.text.length : end;
    const line = this.text.slice(this.position, stop);
    this.position = stop + 1;
    this.line++;
    return line;
  }
}

const REAL = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;

const BOUNDS = new Map([
  [0, ' of at least 0'],
  [1, ', counted from 1'],
]);
