import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { checkTypes, ensureBundle } from './lib/build.mjs';
import { runChecks } from './lib/checks.mjs';
import { ensureChromium } from './lib/chromium.mjs';
import { ensureInstalled } from './lib/install.mjs';
import { main } from './lib/main.mjs';
import { root } from './lib/paths.mjs';
import { ensurePostgres } from './lib/postgres.mjs';
import { ensurePython } from './lib/python.mjs';
import { run } from './lib/run.mjs';
import { countTests } from './lib/test-count.mjs';

/** Sets up, checks and tests everything; with arguments, hands them to vitest and leaves the static checks out. */
await main(async (args) => {
  await ensurePython();
  await ensureChromium();
  if (process.env.DATABASE_URL === undefined) await ensurePostgres();
  await ensureInstalled();
  await ensureBundle();
  const failedChecks = args.length === 0 ? await runAllChecks() : [];
  const { code, passed, failed } = await runVitest(args);
  if (failedChecks.length > 0) process.stdout.write(`npm run check failed: ${failedChecks.join(', ')}\n`);
  process.stdout.write(`${passed} passed, ${failed} failed\n`);
  return code !== 0 || failed > 0 || failedChecks.length > 0 ? 1 : 0;
});

async function runAllChecks() {
  await checkTypes({ quiet: true });
  return runChecks();
}

async function runVitest(args) {
  const folder = mkdtempSync(join(tmpdir(), 'thalweg-test-'));
  const report = join(folder, 'report.json');
  const rules = args.some((arg) => /^(-u|--update)/.test(arg)) ? [] : ['--update=none'];
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${report}`];
  try {
    const code = await run(process.execPath, [
      join(root, 'node_modules/vitest/vitest.mjs'),
      'run',
      ...reporters,
      ...rules,
      ...args,
    ]);
    return { code, ...countTests(readReport(report)) };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

function readReport(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8'));
  } catch {
    return null;
  }
}
