import knex, { type Knex } from 'knex';

/** What a store works on: the pool, or the transaction it is called in. */
export type Database = Knex;

const POOL = { min: 0, max: 20 };

/** A pool of connections to the database of a URL. Close it with `destroy`. */
export function connect(url: string): Database {
  return knex({ client: 'pg', connection: { connectionString: url, application_name: 'thalweg' }, pool: POOL });
}
