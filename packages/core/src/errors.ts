/** Every stable error code, with what it means. Callers branch on the code; the message is for people. */
export const ERROR_CODES = {
  'not-json': 'the text is not JSON',
  'duplicate-key': 'an object names the same key twice',
  'unknown-field': 'a document has a field its schema does not know',
  'wrong-schema': 'a document does not follow the schema it names',
  'ragged-matrix': 'the rows of a matrix have different lengths',
  'not-finite': 'a number is NaN or infinite',
  'not-hermitian': 'a matrix that must be Hermitian is not',
  'not-symmetric': 'a generator lacks the symmetry that the computation needs',
  'dimension-mismatch': 'shapes do not fit together',
  'negative-rate': 'a rate is negative',
  'row-sum-mismatch': 'a diagonal entry of a rate matrix is neither zero nor minus the sum of its row',
  'not-reversible': 'a Markov chain does not satisfy detailed balance',
  'state-not-positive': 'a state is not positive or not of trace one',
  'state-not-invariant': 'the declared reference state is not invariant',
  'length-not-conditionally-negative': 'a group length does not generate a Markov semigroup',
  'spectrum-not-balanced': 'a bath spectrum or frequency list violates detailed balance',
  'algebra-not-preserved': 'a generator does not map its algebra into itself',
  'not-an-algebra': 'a span of matrices is not closed under products and adjoints, or lacks the identity',
  'not-a-group': 'a multiplication table is not that of a group',
  'not-completely-positive': 'a semigroup is not completely positive',
  'not-positive-definite': 'a matrix that must be positive definite is not',
  'singular-matrix': 'a matrix that must be invertible is not',
  'no-convergence': 'an iteration did not converge within its limit',
  'outside-folder': 'a file reference leaves the folder of its document',
  'truncated-file': 'a file ends too early',
  'too-large': 'an input exceeds the stated limit',
  'bad-file': 'a file is not in the format its name promises',
  'digest-mismatch': 'bytes do not have the digest under which they were asked for',
  'not-found': 'a file or name does not exist',
  'cannot-write': 'an output cannot be written',
  'not-allowed': 'a service refuses a request to who asks',
  refused: 'a service refuses a request for what is in it',
  usage: 'a command or function was called wrongly',
  'generator-failed': 'the generator of an example threw, returned no plain data or broke the interpreter',
  'not-supported': 'a well-formed request that is outside what is implemented',
  unavailable: 'a service cannot be reached or used',
  interrupted: 'the computation was stopped from outside',
  'time-limit': 'the time limit passed before there was a result',
  internal: 'an invariant of the program itself failed',
} as const;

export type ErrorCode = keyof typeof ERROR_CODES;

export interface ErrorContext {
  /** JSON pointer (RFC 6901) to the offending place of the document. */
  readonly pointer?: string;
  /** Plain data for machines: offending values, indices, limits. */
  readonly details?: Record<string, unknown>;
  readonly cause?: unknown;
}

/** A problem that a caller can act on. The message says what was expected, what came and what to do. */
export class ThalwegError extends Error {
  readonly code: ErrorCode;
  readonly pointer?: string;
  readonly details?: Record<string, unknown>;

  constructor(code: ErrorCode, message: string, context: ErrorContext = {}) {
    super(message, 'cause' in context ? { cause: context.cause } : undefined);
    this.name = 'ThalwegError';
    this.code = code;
    if (context.pointer !== undefined) this.pointer = context.pointer;
    if (context.details !== undefined) this.details = context.details;
  }
}
