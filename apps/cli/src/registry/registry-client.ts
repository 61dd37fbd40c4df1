import { ThalwegError, type ErrorCode } from '@thalweg/core';
import { problemSchema } from '@thalweg/format/api';
import type { z } from 'zod';
import { VERSION } from '../version.js';

/** Longest wait for an answer. */
const ANSWER_MILLISECONDS = 60_000;

/** Answers larger than this are not read. */
const MOST_BYTES = 32 * 1024 * 1024;

export interface RegistryRequest {
  readonly method?: 'GET' | 'POST';
  /** From the root of the registry. */
  readonly path: string;
  readonly headers?: Readonly<Record<string, string>>;
  readonly body?: FormData | string;
}

/** One registry, spoken to with a token or without. */
export interface RegistryClient {
  readonly address: string;
  /** The bytes of an answer. Throws `unavailable`, `not-found`, `not-allowed` or `refused`, with what the registry said. */
  readonly bytes: (request: RegistryRequest) => Promise<Uint8Array>;
  /** A document, checked against its schema. */
  readonly document: <Schema extends z.ZodType>(schema: Schema, request: RegistryRequest) => Promise<z.infer<Schema>>;
}

/** A client of the registry at an address. */
export function createClient(address: string, token: string | null): RegistryClient {
  const bytes = async (request: RegistryRequest): Promise<Uint8Array> => {
    const response = await send(address, token, request);
    const content = await readBounded(response, address);
    if (!response.ok) throw refusal(response.status, content, address);
    return content;
  };
  return {
    address,
    bytes,
    document: async (schema, request) => {
      const parsed = schema.safeParse(jsonOf(await bytes(request)));
      if (parsed.success) return parsed.data;
      const message = `expected an answer of a registry of examples at ${address}, got another; is the address right?`;
      throw new ThalwegError('unavailable', message);
    },
  };
}

async function send(
  address: string,
  token: string | null,
  { method = 'GET', path, headers = {}, body }: RegistryRequest,
): Promise<Response> {
  try {
    return await fetch(`${address}${path}`, {
      method,
      redirect: 'error',
      signal: AbortSignal.timeout(ANSWER_MILLISECONDS),
      headers: {
        'User-Agent': `thalweg/${VERSION}`,
        ...(token === null ? {} : { Authorization: `Bearer ${token}` }),
        ...headers,
      },
      ...(body === undefined ? {} : { body }),
    });
  } catch (cause) {
    throw unavailable(address, cause);
  }
}

async function readBounded(response: Response, address: string): Promise<Uint8Array> {
  const chunks: Uint8Array[] = [];
  let size = 0;
  try {
    for await (const chunk of response.body ?? []) {
      size += chunk.length;
      if (size > MOST_BYTES) throw new Error(`it sends more than ${MOST_BYTES} bytes`);
      chunks.push(chunk);
    }
  } catch (cause) {
    throw unavailable(address, cause);
  }
  return new Uint8Array(Buffer.concat(chunks));
}

function unavailable(address: string, cause: unknown): ThalwegError {
  const { message, cause: inner } = cause as Error & { cause?: Error };
  const why = inner?.message || message;
  return new ThalwegError(
    'unavailable',
    `expected a registry at ${address}, got no answer: ${why}; try again, or name another with --registry`,
    { cause },
  );
}

const CODE_OF_STATUS: Readonly<Record<number, ErrorCode>> = {
  401: 'not-allowed',
  403: 'not-allowed',
  404: 'not-found',
  429: 'unavailable',
};

function refusal(status: number, content: Uint8Array, address: string): ThalwegError {
  const problem = problemSchema.safeParse(jsonOf(content));
  const code = CODE_OF_STATUS[status] ?? (status >= 500 ? 'unavailable' : 'refused');
  if (!problem.success) return new ThalwegError(code, `expected an answer from ${address}, got status ${status}`);
  const { detail, errors } = problem.data;
  const { pointer, document } = errors?.[0] ?? {};
  const hint = status === 401 ? ' (thalweg sign-in keeps a token)' : '';
  return new ThalwegError(code, `${detail}${hint}`, {
    ...(pointer === undefined ? {} : { pointer }),
    details: { registry: address, problem: problem.data.code, ...(document === undefined ? {} : { document }) },
  });
}

function jsonOf(content: Uint8Array): unknown {
  try {
    return JSON.parse(new TextDecoder().decode(content));
  } catch {
    return null;
  }
}
