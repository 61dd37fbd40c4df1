import 'vitest';

declare module 'vitest' {
  interface ProvidedContext {
    /** PostgreSQL server as superuser, without a database name. */
    databaseServer: string;
  }
}
