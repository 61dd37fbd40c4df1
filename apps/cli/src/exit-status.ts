import type { ErrorCode } from '@thalweg/core';

/** Exit codes of the command line (BSD sysexits.h from 64 on; 130 = 128 + SIGINT). */
export const EXIT_STATUS = {
  yes: 0,
  no: 1,
  undecided: 2,
  usage: 64,
  badDocument: 65,
  notFound: 66,
  unavailable: 69,
  internal: 70,
  cannotWrite: 73,
  tryAgain: 75,
  notAllowed: 77,
  interrupted: 130,
} as const;

export type ExitStatus = (typeof EXIT_STATUS)[keyof typeof EXIT_STATUS];

/** The exit code of every error code. A code missing here is a type error. */
export const EXIT_STATUS_OF_ERROR: Readonly<Record<ErrorCode, ExitStatus>> = {
  'not-json': EXIT_STATUS.badDocument,
  'duplicate-key': EXIT_STATUS.badDocument,
  'unknown-field': EXIT_STATUS.badDocument,
  'wrong-schema': EXIT_STATUS.badDocument,
  'ragged-matrix': EXIT_STATUS.badDocument,
  'row-sum-mismatch': EXIT_STATUS.badDocument,
  'algebra-not-preserved': EXIT_STATUS.badDocument,
  'not-an-algebra': EXIT_STATUS.badDocument,
  'not-a-group': EXIT_STATUS.badDocument,
  'not-finite': EXIT_STATUS.badDocument,
  'not-hermitian': EXIT_STATUS.badDocument,
  'not-symmetric': EXIT_STATUS.badDocument,
  'dimension-mismatch': EXIT_STATUS.badDocument,
  'negative-rate': EXIT_STATUS.badDocument,
  'not-reversible': EXIT_STATUS.badDocument,
  'state-not-positive': EXIT_STATUS.badDocument,
  'state-not-invariant': EXIT_STATUS.badDocument,
  'length-not-conditionally-negative': EXIT_STATUS.badDocument,
  'spectrum-not-balanced': EXIT_STATUS.badDocument,
  'not-completely-positive': EXIT_STATUS.badDocument,
  'not-positive-definite': EXIT_STATUS.badDocument,
  'singular-matrix': EXIT_STATUS.badDocument,
  'no-convergence': EXIT_STATUS.internal,
  'outside-folder': EXIT_STATUS.badDocument,
  'truncated-file': EXIT_STATUS.badDocument,
  'too-large': EXIT_STATUS.badDocument,
  'bad-file': EXIT_STATUS.badDocument,
  'digest-mismatch': EXIT_STATUS.badDocument,
  'not-found': EXIT_STATUS.notFound,
  'cannot-write': EXIT_STATUS.cannotWrite,
  usage: EXIT_STATUS.usage,
  'generator-failed': EXIT_STATUS.badDocument,
  'not-supported': EXIT_STATUS.badDocument,
  interrupted: EXIT_STATUS.interrupted,
  'time-limit': EXIT_STATUS.tryAgain,
  internal: EXIT_STATUS.internal,
};
