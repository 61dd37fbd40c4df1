import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { TestProject } from 'vitest/node';
import { startCluster } from '../../packages/setup/lib/postgres.mjs';

/** Starts one disposable PostgreSQL cluster for all database tests, or takes the server that DATABASE_URL names. */
export default async function startDatabase(project: TestProject): Promise<(() => Promise<void>) | undefined> {
  const given = process.env['DATABASE_URL'];
  if (given !== undefined) {
    project.provide('databaseServer', new URL('.', given).href.replace(/\/$/, ''));
    return undefined;
  }
  const folder = mkdtempSync(join(tmpdir(), 'thalweg-test-database-'));
  const cluster = await startCluster(folder, { disposable: true });
  project.provide('databaseServer', cluster.url);
  return async () => {
    await cluster.stop();
    rmSync(folder, { recursive: true, force: true });
  };
}
