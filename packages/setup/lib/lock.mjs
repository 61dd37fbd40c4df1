import { createHash } from 'node:crypto';
import { readFileSync, renameSync, unlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { root } from './paths.mjs';

const POLL_MILLISECONDS = 200;
let depth = 0;

/**
 * Runs `work` while no other process sets up the same clone. The lock is a file holding the owner's process id, kept
 * outside the clone because `npm ci` empties node_modules; the lock of a process that died is taken over.
 * A nested call in the same process runs at once.
 */
export async function withLock(work, path = lockPath()) {
  if (depth === 0) await acquire(path);
  depth += 1;
  try {
    return await work();
  } finally {
    depth -= 1;
    if (depth === 0) unlinkSync(path);
  }
}

/** Lock file of a clone: one for each folder and user. */
export function lockPath(folder = root) {
  const user = process.getuid?.() ?? 'user';
  const digest = createHash('sha256').update(`${user}:${folder}`).digest('hex').slice(0, 16);
  return join(tmpdir(), `thalweg-setup-${digest}.lock`);
}

async function acquire(path) {
  let told = false;
  while (!tryCreate(path)) {
    const owner = readOwner(path);
    if (owner !== null && !isAlive(owner)) takeOver(path, owner);
    else {
      if (!told) process.stderr.write('Waiting for another set-up of this clone to finish.\n');
      told = true;
      await sleep(POLL_MILLISECONDS);
    }
  }
}

function tryCreate(path) {
  try {
    writeFileSync(path, String(process.pid), { flag: 'wx' });
    return true;
  } catch (error) {
    if (error.code === 'EEXIST') return false;
    throw error;
  }
}

function readOwner(path) {
  try {
    const text = readFileSync(path, 'utf8').trim();
    return /^\d+$/.test(text) ? Number(text) : null;
  } catch {
    return null;
  }
}

function isAlive(pid) {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}

/** Renaming first makes sure that of several waiters only one removes the dead owner's file. */
function takeOver(path, owner) {
  const aside = `${path}.${process.pid}`;
  try {
    if (readOwner(path) !== owner) return;
    renameSync(path, aside);
    unlinkSync(aside);
  } catch (error) {
    if (error.code !== 'ENOENT') throw error;
  }
}
