import { ThalwegError } from '@thalweg/core';
import pg, { type Pool } from 'pg';
import { ensureTables } from './queue-tables.js';

/** Connections that one program opens at most, the one that tells it is alive aside. */
const CONNECTIONS = 10;

/**
 * Runs `work` with connections to the queue's database, and closes them. An interrupt closes them at once. A password comes from
 * PGPASSWORD or ~/.pgpass, never from the command line. Throws `unavailable` when the server cannot be reached.
 */
export async function withQueue<Result>(
  url: string,
  signal: AbortSignal,
  work: (pool: Pool) => Promise<Result>,
): Promise<Result> {
  const pool = new pg.Pool({ connectionString: url, max: CONNECTIONS, application_name: 'thalweg sweep' });
  // An idle connection that breaks is replaced; one in use fails its query.
  pool.on('error', () => undefined);
  pool.on('connect', (client) => client.on('error', () => undefined));
  let open = true;
  const close = async (): Promise<void> => {
    if (open) {
      open = false;
      await pool.end();
    }
  };
  const interrupt = () => void close();
  signal.addEventListener('abort', interrupt, { once: true });
  try {
    await ensureTables(pool).catch((error: unknown) => {
      throw unavailable(error);
    });
    return await work(pool);
  } finally {
    signal.removeEventListener('abort', interrupt);
    await close();
  }
}

function unavailable(cause: unknown): ThalwegError {
  const { message, code } = cause as { readonly message?: string; readonly code?: string };
  const reason = message === undefined || message === '' ? (code ?? 'unknown reason') : message;
  return new ThalwegError(
    'unavailable',
    `the job queue's PostgreSQL cannot be used: ${reason}. Check --queue and that the server runs`,
    {
      cause,
    },
  );
}
