import { sparseFromTriplets, type SparseMatrix, type Triplet } from '@thalweg/core';
import { describeValue, shorten } from '../describe-value.js';
import { fault, type Fault } from '../fault.js';
import { MATRIX_LIMITS, type MatrixLimits } from '../limits.js';
import { findSparseSizeFault } from './entries-form.js';
import type { PauliForm } from './matrix-document.js';

const LETTERS = /^[IXYZ]+$/;

/** The first fault of a Pauli string or combination of strings, or null. */
export function findPauliFault({ pauli }: PauliForm, limits: MatrixLimits = MATRIX_LIMITS): Fault | null {
  if (typeof pauli === 'string') {
    const found = findStringFault(pauli, pauli.length, limits) ?? findSparseSizeFault(2 ** pauli.length, limits);
    return at(['pauli'], found);
  }
  const strings = Object.keys(pauli);
  const [first] = strings;
  if (first === undefined) {
    return fault(
      'wrong-schema',
      'expected at least one Pauli string, got an empty object; write for example {"XI": 0.5, "ZZ": -1}',
      ['pauli'],
    );
  }
  for (const string of strings) {
    const found = findStringFault(string, first.length, limits) ?? findCoefficientFault(pauli[string]);
    if (found) return at(['pauli', string], found);
  }
  return at(['pauli'], findSparseSizeFault(new Set(strings.map(flipMask)).size * 2 ** first.length, limits));
}

/**
 * Pauli strings already checked, as a sparse 2^n × 2^n matrix. The first letter acts on the first tensor factor, the most
 * significant bit of the index: "XI" is X ⊗ 1.
 */
export function decodePauli({ pauli }: PauliForm): SparseMatrix {
  const terms = typeof pauli === 'string' ? { [pauli]: 1 } : pauli;
  const qubits = Object.keys(terms)[0]?.length ?? 0;
  const diagonals = new Map<number, Diagonal>();
  for (const [string, coefficient] of Object.entries(terms)) addString(diagonals, string, coefficient);
  return sparseFromTriplets(2 ** qubits, 2 ** qubits, triplets(diagonals, 2 ** qubits));
}

/** Entries (i, i xor mask) for all i: the strings with the same flipped qubits share them. */
interface Diagonal {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** Bits of the qubits that the string flips (X and Y). */
function flipMask(string: string): number {
  return bits(string, 'XY');
}

function bits(string: string, letters: string): number {
  let mask = 0;
  for (const letter of string) mask = mask * 2 + (letters.includes(letter) ? 1 : 0);
  return mask;
}

/** <i|P|i xor flips> = (−i)^{#Y} (−1)^{#(bits of i at Y or Z)}, from Y = [[0,−i],[i,0]] with row bit 0 giving −i, 1 giving i. */
function addString(diagonals: Map<number, Diagonal>, string: string, coefficient: number): void {
  const size = 2 ** string.length;
  const mask = flipMask(string);
  const phases = bits(string, 'YZ');
  const quarterTurns = string.split('Y').length - 1;
  const target = diagonals.get(mask) ?? { re: new Float64Array(size), im: new Float64Array(size) };
  diagonals.set(mask, target);
  const part = quarterTurns % 2 === 0 ? target.re : target.im;
  const sign = quarterTurns % 4 === 1 || quarterTurns % 4 === 2 ? -coefficient : coefficient;
  for (let i = 0; i < size; i++) part[i] = (part[i] ?? 0) + (isOdd(i & phases) ? -sign : sign);
}

function isOdd(bitSet: number): boolean {
  let odd = false;
  for (let rest = bitSet; rest !== 0; rest &= rest - 1) odd = !odd;
  return odd;
}

function* triplets(diagonals: Map<number, Diagonal>, size: number): Generator<Triplet> {
  for (const [mask, { re, im }] of diagonals) {
    for (let i = 0; i < size; i++) yield [i, i ^ mask, re[i] ?? 0, im[i] ?? 0];
  }
}

function findStringFault(string: string, length: number, limits: MatrixLimits): Fault | null {
  if (!LETTERS.test(string)) {
    return fault(
      'wrong-schema',
      `expected a Pauli string of the letters I, X, Y, Z, got ${describeValue(string)}; write for example "XIZ"`,
    );
  }
  if (2 ** string.length > limits.side) {
    const most = Math.floor(Math.log2(limits.side));
    const message = `expected a Pauli string of at most ${most} letters, got ${string.length} (a matrix of 2^${string.length} rows); reduce the model`;
    return fault('too-large', message, [], { qubits: string.length, side: limits.side });
  }
  if (string.length === length) return null;
  const message = `expected Pauli strings of ${length} letters as the first, got ${string.length} in "${shorten(string)}"; pad with I`;
  return fault('dimension-mismatch', message);
}

function findCoefficientFault(value: unknown): Fault | null {
  if (Number.isFinite(value)) return null;
  const code = typeof value === 'number' ? 'not-finite' : 'wrong-schema';
  return fault(code, `expected a real coefficient, got ${describeValue(value)}; write a finite number`);
}

function at(path: readonly string[], found: Fault | null): Fault | null {
  return found && { ...found, path };
}
