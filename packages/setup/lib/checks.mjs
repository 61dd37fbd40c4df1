import { join } from 'node:path';
import { checkTypes } from './build.mjs';
import { root } from './paths.mjs';
import { capture } from './run.mjs';

const PARALLEL = 2;

const CHECKS = [
  { name: 'types (tsc -b)', start: () => checkTypes({ quiet: true }) },
  { name: 'eslint', start: () => tool('eslint/bin/eslint.js', ['--max-warnings', '0', '.']) },
  { name: 'prettier', start: () => tool('prettier/bin/prettier.cjs', ['--check', '--log-level', 'warn', '.']) },
  { name: 'knip', start: () => tool('knip/bin/knip.js', ['--no-progress', '--no-config-hints']) },
  {
    name: 'dependency-cruiser',
    start: () =>
      tool('dependency-cruiser/bin/dependency-cruise.mjs', ['--config', '.dependency-cruiser.mjs', 'packages', 'apps']),
  },
];

/** Runs every static check, two at a time, and resolves to the names of those that failed. Prints one line each. */
export async function runChecks(report = (text) => process.stdout.write(text)) {
  const waiting = [...CHECKS];
  const failed = [];
  const worker = async () => {
    for (let check = waiting.shift(); check !== undefined; check = waiting.shift()) {
      const begin = Date.now();
      const { code, output } = await check.start();
      const seconds = ((Date.now() - begin) / 1000).toFixed(1);
      if (code !== 0) failed.push(check.name);
      report(
        `${code === 0 ? 'ok    ' : 'FAILED'} ${check.name}, ${seconds} s\n${code === 0 ? '' : `${output.trimEnd()}\n`}`,
      );
    }
  };
  await Promise.all(Array.from({ length: PARALLEL }, worker));
  return failed;
}

function tool(script, args) {
  return capture(process.execPath, [join(root, 'node_modules', script), ...args], {
    env: { ...process.env, NO_COLOR: '1' },
  });
}
