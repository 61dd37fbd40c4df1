import type { Database } from '../database/connect.js';

/** What a member may be called; the database asks for the same. */
const MEMBER_NAME = /^(?=.{2,39}$)[a-z0-9]+(-[a-z0-9]+)*$/;

/** Adds a member; resolves to its id. Throws when the name is none, or taken. */
export async function insertMember(
  db: Database,
  { name, fullName, role = 'member' }: { readonly name: string; readonly fullName: string; readonly role?: string },
): Promise<string> {
  if (!MEMBER_NAME.test(name)) {
    throw new Error(
      `expected a name of 2 to 39 characters a-z, 0-9 and single hyphens, got "${name}"; choose such a one`,
    );
  }
  const [row] = await db('members')
    .insert({ name, full_name: fullName, role })
    .onConflict('name')
    .ignore()
    .returning<{ id: string }[]>('id');
  if (!row) throw new Error(`expected a name that is free, got ${name}, who is a member already; choose another`);
  return row.id;
}

/** Id of a member by name, or null. */
export async function findMember(db: Database, name: string): Promise<string | null> {
  const row = await db('members').where({ name }).first<{ id: string } | undefined>('id');
  return row?.id ?? null;
}
