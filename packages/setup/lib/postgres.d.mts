/** Makes sure that PostgreSQL's server programs are there; installs Debian's package where it may. */
export function ensurePostgres(): Promise<void>;

/** Starts a PostgreSQL cluster on loopback; see postgres.mjs. */
export function startCluster(
  folder: string,
  options?: { readonly port?: number; readonly disposable?: boolean },
): Promise<{ readonly url: string; readonly port: number; readonly stop: () => Promise<void> }>;

/** Makes a database on a cluster unless it is there. */
export function ensureDatabase(cluster: { readonly port: number }, name: string): Promise<void>;
