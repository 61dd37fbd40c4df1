import { STATUS_CODES } from 'node:http';
import { ThalwegError } from '@thalweg/core';
import type { ErrorRequestHandler, RequestHandler } from 'express';
import { MulterError } from 'multer';
import { Problem, problemOf } from './problem.js';

/** Nothing answers this address. */
export const notFound: RequestHandler = (request) => {
  throw new Problem(404, 'not-found', `There is nothing at ${request.path}.`);
};

/** The one place where errors become answers: problem details (RFC 9457); what is not known is logged and not shown. */
export const handleErrors: ErrorRequestHandler = (error, request, response, next) => {
  if (response.headersSent) {
    next(error);
    return;
  }
  const problem = asProblem(error);
  if (problem.status >= 500) request.log.error({ err: error as unknown }, 'a request failed');
  response
    .status(problem.status)
    .set(problem.headers)
    .type('application/problem+json')
    .send(
      JSON.stringify({
        type: `/problems/${problem.code}`,
        title: STATUS_CODES[problem.status] ?? 'Error',
        status: problem.status,
        code: problem.code,
        detail: problem.message,
        ...(problem.errors.length > 0 ? { errors: problem.errors } : {}),
      }),
    );
};

function asProblem(error: unknown): Problem {
  if (error instanceof Problem) return error;
  if (error instanceof ThalwegError) return problemOf(error);
  if (error instanceof MulterError) {
    const status = error.code === 'LIMIT_FILE_SIZE' ? 413 : 400;
    return new Problem(
      status,
      status === 413 ? 'too-large' : 'bad-upload',
      `The upload was refused: ${error.message}.`,
    );
  }
  const status = clientStatus(error);
  if (status) return new Problem(status, 'bad-request', 'The request could not be read.');
  return new Problem(500, 'internal', 'The registry failed. Nothing was changed; try again later.');
}

/** Status of the errors that Express and its parsers raise for malformed requests. */
function clientStatus(error: unknown): number | null {
  if (typeof error !== 'object' || error === null || !('status' in error)) return null;
  const { status } = error;
  return typeof status === 'number' && status >= 400 && status < 500 ? status : null;
}
