import type { Database } from '../database/connect.js';

/** What a request was answered. */
export interface Answer {
  readonly status: number;
  readonly body: Readonly<Record<string, unknown>>;
}

export interface KeptAnswer extends Answer {
  /** SHA-256 of the request. */
  readonly request: Buffer;
}

/** Holds a key until the transaction ends; false while another transaction holds it. */
export async function lockKey(trx: Database, memberId: string, key: string): Promise<boolean> {
  const { rows } = await trx.raw<{ rows: { held: boolean }[] }>(
    'select pg_try_advisory_xact_lock(hashtextextended(?, 0)) as held',
    [`${memberId} ${key}`],
  );
  return rows[0]?.held ?? false;
}

/** The answer kept under a member's key, or null. */
export async function findAnswer(db: Database, memberId: string, key: string): Promise<KeptAnswer | null> {
  const row = await db('answers')
    .where({ member_id: memberId, key })
    .first<KeptAnswer | undefined>('status', 'body', 'request');
  return row ?? null;
}

/** Keeps an answer. */
export async function insertAnswer(
  trx: Database,
  { memberId, key, request, status, body }: KeptAnswer & { readonly memberId: string; readonly key: string },
): Promise<void> {
  await trx('answers').insert({ member_id: memberId, key, request, status, body: JSON.stringify(body) });
}
