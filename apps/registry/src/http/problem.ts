import type { ErrorCode, ThalwegError } from '@thalweg/core';

/** One fault of a request, with its place in the document. */
export interface ProblemFault {
  readonly code: string;
  readonly detail: string;
  /** JSON pointer (RFC 6901). */
  readonly pointer?: string;
  /** File of a package in which the pointer points. */
  readonly document?: string;
}

/** What a request is refused with: problem details (RFC 9457). */
export class Problem extends Error {
  readonly status: number;
  readonly code: string;
  readonly errors: readonly ProblemFault[];
  readonly headers: Readonly<Record<string, string>>;

  constructor(
    status: number,
    code: string,
    detail: string,
    more: { readonly errors?: readonly ProblemFault[]; readonly headers?: Readonly<Record<string, string>> } = {},
  ) {
    super(detail);
    this.name = 'Problem';
    this.status = status;
    this.code = code;
    this.errors = more.errors ?? [];
    this.headers = more.headers ?? {};
  }
}

/** HTTP status of the errors of documents; all others are the server's own fault. */
const STATUS_OF_CODE: Partial<Record<ErrorCode, number>> = {
  'too-large': 413,
  'digest-mismatch': 422,
  'not-found': 404,
  internal: 500,
  'cannot-write': 500,
  usage: 400,
};

const DOCUMENT_FAULT = 422;

/** The problem that an error of a document or archive makes. */
export function problemOf(error: ThalwegError): Problem {
  const { code, message, pointer, details } = error;
  const document = typeof details?.['document'] === 'string' ? details['document'] : undefined;
  const fault = {
    code,
    detail: message,
    ...(pointer === undefined ? {} : { pointer }),
    ...(document === undefined ? {} : { document }),
  };
  return new Problem(STATUS_OF_CODE[code] ?? DOCUMENT_FAULT, code, message, { errors: [fault] });
}
