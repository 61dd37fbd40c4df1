import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { isInstalled } from '../lib/install.mjs';

let folder;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-install-'));
  mkdirSync(join(folder, 'node_modules'));
});

afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

function lock(packages) {
  writeFileSync(join(folder, 'package-lock.json'), JSON.stringify({ packages: { '': { name: 'top' }, ...packages } }));
}

function installed(packages) {
  writeFileSync(join(folder, 'node_modules/.package-lock.json'), JSON.stringify({ packages }));
}

const zod = { 'node_modules/zod': { version: '4.6.7' } };

test('nothing installed yet', () => {
  lock(zod);
  expect(isInstalled(folder)).toBe(false);
});

test('all installed, with or without optional packages', () => {
  lock({ ...zod, 'node_modules/fsevents': { version: '2.3.3', optional: true } });
  installed(zod);
  expect(isInstalled(folder)).toBe(true);
});

test('another version, or a missing package, is stale', () => {
  lock(zod);
  installed({ 'node_modules/zod': { version: '4.6.6' } });
  expect(isInstalled(folder)).toBe(false);
  lock({ ...zod, 'node_modules/commander': { version: '14.0.3' } });
  installed(zod);
  expect(isInstalled(folder)).toBe(false);
});

test('a new workspace is stale until it is linked', () => {
  lock({ 'node_modules/thalweg': { resolved: 'apps/cli', link: true } });
  installed({});
  expect(isInstalled(folder)).toBe(false);
  installed({ 'node_modules/thalweg': { resolved: 'apps/cli', link: true } });
  expect(isInstalled(folder)).toBe(true);
});

test('a half-written record of an interrupted installation is stale', () => {
  lock(zod);
  writeFileSync(join(folder, 'node_modules/.package-lock.json'), '{"packages": {');
  expect(isInstalled(folder)).toBe(false);
});

test('a missing lock file is an error that says what to do', () => {
  expect(() => isInstalled(folder)).toThrow('restore it from version control');
});
