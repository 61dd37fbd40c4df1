import { execFileSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { pathToFileURL } from 'node:url';
import { createSandbox } from '../src/node/index.js';

const BUILDS = 1000;
const EVERY = 200;

/** Builds a model again and again in one process; run by `npm run bench -- builds`. Linux only: it reads /proc. */
const run = {
  source: `export default ({ n }, kit) => kit.lindbladModel({
    jumps: Array.from({ length: n }, (_, k) => ({ rate: kit.exp(-k), matrix: kit.site(n, k, kit.pauli('X')) })),
  });`,
  parameters: { n: 3 },
  want: 'model',
} as const;

execFileSync(process.execPath, ['packages/sandbox/build.mjs']);
const sandbox = createSandbox({ script: pathToFileURL('packages/sandbox/dist/bundle/sandbox-process.js') });
await sandbox.run(run);
const start = { wall: performance.now(), processor: processor() };
process.stdout.write(`builds  resident MiB  processor ms a build  wall ms a build\n`);
for (let k = 1; k <= BUILDS; k++) {
  await sandbox.run(run);
  if (k % EVERY !== 0) continue;
  const cells = [k, resident(), (processor() - start.processor) / k, (performance.now() - start.wall) / k];
  process.stdout.write(`${cells.map((cell) => cell.toFixed(1).padStart(10)).join('  ')}\n`);
}
sandbox.close();

function child(): number {
  const children = readFileSync(`/proc/${process.pid}/task/${process.pid}/children`, 'utf8').trim().split(' ');
  return Number(children.find((pid) => readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('sandbox-process')));
}

function resident(): number {
  return Number(readFileSync(`/proc/${child()}/statm`, 'utf8').split(' ')[1]) / 256;
}

/** User and system time of the process, ms, in ticks of 10. */
function processor(): number {
  const fields = readFileSync(`/proc/${child()}/stat`, 'utf8').split(') ')[1].split(' ');
  return 10 * (Number(fields[11]) + Number(fields[12]));
}
