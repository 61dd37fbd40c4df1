import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import type { MeanName } from '../metric/operator-mean.js';

/** How far an end can be trusted, strongest first (method of the project's README, "Grades"). */
export type Grade = 'exact' | 'enclosed' | 'certified' | 'observed';

/** The constants a sheet may hold. */
export const CONSTANT_IDS = [
  'gap',
  'ge',
  'cge',
  'be',
  'cbe',
  'mlsi',
  'clsi',
  'lsi',
  't2',
  'diameter',
  'mixing',
] as const;

export type ConstantId = (typeof CONSTANT_IDS)[number];

/** A state and an observable at which an inequality's best constant is at most `value`. */
export interface Witness {
  readonly constant: ConstantId;
  readonly mean?: MeanName;
  /** The quotient at (state, observable), a rate. */
  readonly value: number;
  /** N·k × N·k density matrix. */
  readonly state: ComplexMatrix;
  /** N·k × N·k observable, or null where the state alone decides (entropy constants). */
  readonly observable: ComplexMatrix | null;
  /** k, the side of the ancilla matrix algebra; 1 for none. */
  readonly amplification: number;
}

/** One end of a bracket. */
export interface End {
  /** A rate (a length for `diameter`, a time for `mixing`); −∞ is a possible answer. */
  readonly value: number;
  readonly grade: Grade;
  /** The rule, certificate, eigenvalue problem or search that gives it. */
  readonly by: string;
  /**
   * Same units. Where the grade is `certified`, a bound on the floating-point error of `value`; where it is `enclosed`, how far
   * the end is from the value computed, or the width of its enclosure.
   */
  readonly margin?: number;
  readonly evidence?: Witness;
}

/** Lower and upper value of one constant; null where nothing is known on that side. */
export interface Bracket {
  readonly lower: End | null;
  readonly upper: End | null;
}
