import type { Database } from '../database/connect.js';

/** Adds a member; resolves to its id. */
export async function insertMember(
  db: Database,
  { name, fullName, role = 'member' }: { readonly name: string; readonly fullName: string; readonly role?: string },
): Promise<string> {
  const [row] = await db('members').insert({ name, full_name: fullName, role }).returning<{ id: string }[]>('id');
  if (!row) throw new Error('expected the id of a new member, got none');
  return row.id;
}

/** Id of a member by name, or null. */
export async function findMember(db: Database, name: string): Promise<string | null> {
  const row = await db('members').where({ name }).first<{ id: string } | undefined>('id');
  return row?.id ?? null;
}
