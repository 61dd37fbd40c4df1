import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { ensureBundle } from './lib/build.mjs';
import { ensureInstalled } from './lib/install.mjs';
import { main } from './lib/main.mjs';
import { root } from './lib/paths.mjs';
import { ensureDatabase, ensurePostgres, startCluster } from './lib/postgres.mjs';
import { run } from './lib/run.mjs';

const NAME = 'thalweg';
const OWNER = 'postgres';
const APPLICATION = 'thalweg_application';
const program = join(root, 'apps/registry/dist/registry.js');

/**
 * Sets up and starts the registry with a PostgreSQL cluster of its own in `.thalweg` (THALWEG_DATA names another folder), until
 * interrupted. With arguments, runs one administration command on it instead, such as `add-member`.
 */
await main(async (args) => {
  await ensureInstalled();
  await ensurePostgres();
  await ensureBundle();
  const cluster = await startCluster(process.env.THALWEG_DATA ?? join(root, '.thalweg'));
  try {
    await ensureDatabase(cluster, NAME);
    const owner = { ...process.env, DATABASE_URL: `${cluster.url}/${NAME}` };
    // Standard output belongs to the command: a token printed there can be handed on.
    const migrated = await run(process.execPath, [program, 'migrate'], { env: owner, stdio: ['ignore', 2, 2] });
    if (migrated !== 0) return migrated;
    if (args.length > 0) return await run(process.execPath, [program, ...args], { env: owner });
    const url = owner.DATABASE_URL.replace(`//${OWNER}@`, `//${APPLICATION}@`);
    return await serve({ ...process.env, DATABASE_URL: url });
  } finally {
    await cluster.stop();
  }
});

/** Runs the server until it ends; signals go to it, so that the database is stopped after it. */
function serve(env) {
  const child = spawn(process.execPath, [program, 'serve'], { stdio: 'inherit', env });
  for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => child.kill(signal));
  return new Promise((resolve, reject) => {
    child.on('error', reject);
    child.on('close', (code) => resolve(code ?? 1));
  });
}
