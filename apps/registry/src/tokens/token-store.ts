import type { Principal, Scope } from '../auth/principal.js';
import type { Database } from '../database/connect.js';

/** Keeps a token by its digest alone. */
export async function insertToken(
  db: Database,
  token: {
    readonly memberId: string;
    readonly label: string;
    readonly digest: Buffer;
    readonly scopes: readonly Scope[];
    readonly expiresAt: Date;
  },
): Promise<void> {
  await db('tokens').insert({
    member_id: token.memberId,
    label: token.label,
    digest: token.digest,
    scopes: [...token.scopes],
    expires_at: token.expiresAt,
  });
}

/** The member whose valid token has this digest, and what it allows; null for none, one that is expired or revoked. */
export async function findPrincipal(db: Database, digest: Buffer): Promise<Principal | null> {
  const { rows } = await db.raw<{ rows: PrincipalRow[] }>(
    `update tokens set last_used_at = now() from members
     where tokens.digest = ? and members.id = tokens.member_id and revoked_at is null and expires_at > now()
     returning members.id, members.name, members.role, tokens.scopes`,
    [digest],
  );
  const row = rows[0];
  return row ? { memberId: row.id, name: row.name, role: row.role, scopes: row.scopes } : null;
}

interface PrincipalRow {
  readonly id: string;
  readonly name: string;
  readonly role: Principal['role'];
  readonly scopes: Scope[];
}
