import { existsSync, mkdirSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ensureDebianPackages } from './debian.mjs';
import { capture } from './run.mjs';

const INSTALLED = '/usr/lib/postgresql';
const START_SECONDS = 60;

/** Safe to lose: what a test's cluster may skip. */
const TEST_SETTINGS = ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off'];

/** Makes sure that PostgreSQL's server programs are there; installs Debian's package where it may. */
export function ensurePostgres() {
  return ensureDebianPackages(['postgresql'], {
    isPresent: () => Promise.resolve(binaries() !== null),
    purpose: 'The registry and the job queue keep their data in PostgreSQL.',
  });
}

/**
 * Starts a PostgreSQL cluster on loopback, made in `folder` when it is not there yet; one that runs there already is used and
 * left running. Resolves to its URL, without a
 * database name, as superuser postgres without a password, and a function that stops it. As root the server runs as the
 * user postgres. `disposable` trades durability for speed.
 */
export async function startCluster(folder, { port = 0, disposable = false } = {}) {
  const bin = binaries();
  if (bin === null) throw new Error('PostgreSQL is not installed: run npm start or npm test, which install it.');
  const data = join(folder, 'data');
  const running = await runningPort(bin, data);
  if (running !== null) return { url: urlAt(running), port: running, stop: () => Promise.resolve() };
  const sockets = mkdtempSync(join(tmpdir(), 'thalweg-pg-'));
  mkdirSync(folder, { recursive: true, mode: 0o755 });
  await own(folder, sockets);
  if (!existsSync(join(data, 'PG_VERSION')) && !(await asServer('test', ['-s', join(data, 'PG_VERSION')]))) {
    await server(join(bin, 'initdb'), ['-D', data, '-U', 'postgres', '-A', 'trust', '-E', 'UTF8', '--locale=C.UTF-8']);
  }
  const chosen = port === 0 ? await freePort() : port;
  const settings = [`listen_addresses=127.0.0.1`, `unix_socket_directories=${sockets}`, 'max_connections=200'];
  if (disposable) settings.push(...TEST_SETTINGS);
  const options = [`-p ${chosen}`, ...settings.map((setting) => `-c ${setting}`)].join(' ');
  const log = join(folder, 'postgres.log');
  await server(join(bin, 'pg_ctl'), ['-D', data, '-l', log, '-w', '-t', String(START_SECONDS), '-o', options, 'start']);
  const stop = async () => {
    await server(join(bin, 'pg_ctl'), ['-D', data, '-m', 'fast', '-w', 'stop']);
    rmSync(sockets, { recursive: true, force: true });
  };
  return { url: urlAt(chosen), port: chosen, stop };
}

const urlAt = (port) => `postgres://postgres@127.0.0.1:${port}`;

/** Port of the server that works on a data folder, the fourth line of its lock file; null when none does. */
async function runningPort(bin, data) {
  if (!(await asServer(join(bin, 'pg_ctl'), ['-D', data, 'status']))) return null;
  const { output } = await asPostgres('sed', ['-n', '4p', join(data, 'postmaster.pid')]);
  const port = Number(output.trim());
  if (!(port > 0)) throw new Error(`The server of ${data} runs, but its port is not known: ${output}`);
  return port;
}

/** Makes a database on a cluster unless it is there. */
export async function ensureDatabase({ port }, name) {
  const where = ['-h', '127.0.0.1', '-p', String(port), '-U', 'postgres'];
  const { code, output } = await capture(join(binaries(), 'createdb'), [...where, name]);
  if (code !== 0 && !output.includes('already exists'))
    throw new Error(`The database ${name} cannot be made:\n${output}`);
}

/** Folder of the newest installed server, or null. */
function binaries() {
  if (!existsSync(INSTALLED)) return null;
  const versions = readdirSync(INSTALLED)
    .filter((name) => existsSync(join(INSTALLED, name, 'bin/initdb')))
    .sort((a, b) => Number(b) - Number(a));
  return versions.length > 0 ? join(INSTALLED, versions[0], 'bin') : null;
}

const isRoot = () => process.getuid?.() === 0;

/** PostgreSQL refuses to run as root: then it gets the folders and its own user. */
async function own(...folders) {
  if (!isRoot()) return;
  for (const folder of folders) {
    const { code, output } = await capture('chown', ['postgres:postgres', folder]);
    if (code !== 0) throw new Error(`The user postgres cannot be given ${folder}: ${output}`);
  }
}

async function server(program, args) {
  const { code, output } = await asPostgres(program, args);
  if (code !== 0) throw new Error(`${program} ended with exit code ${code}:\n${output}`);
}

async function asServer(program, args) {
  return (await asPostgres(program, args)).code === 0;
}

/** Run away from the present folder, which the user postgres may not be allowed to enter. */
function asPostgres(program, args) {
  const [command, words] = isRoot() ? ['runuser', ['-u', 'postgres', '--', program, ...args]] : [program, args];
  return capture(command, words, { cwd: '/', stdio: ['ignore', 'pipe', 'pipe'] });
}

function freePort() {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address();
      probe.close(() => resolve(port));
    });
  });
}
