import type { Knex } from 'knex';
import { MIGRATIONS } from '../../../../migrations/index.js';
import type { Database } from './connect.js';

type Name = keyof typeof MIGRATIONS;

/** The migrations as they are built into the program, so that no folder is searched for them. */
const source: Knex.MigrationSource<Name> = {
  getMigrations: () => Promise.resolve(Object.keys(MIGRATIONS) as Name[]),
  getMigrationName: (name) => name,
  getMigration: (name) => Promise.resolve(MIGRATIONS[name]),
};

/** Brings a database to the present schema; resolves to the names of the migrations that were run. */
export async function migrate(db: Database): Promise<string[]> {
  const [, names] = (await db.migrate.latest({ migrationSource: source })) as [number, string[]];
  return names;
}

/** Takes every migration back; for tests and for nothing else. */
export async function unmigrate(db: Database): Promise<void> {
  await db.migrate.rollback({ migrationSource: source }, true);
}
