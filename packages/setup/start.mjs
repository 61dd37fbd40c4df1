import { join } from 'node:path';
import { ensureBundle } from './lib/build.mjs';
import { ensureInstalled } from './lib/install.mjs';
import { main } from './lib/main.mjs';
import { root } from './lib/paths.mjs';
import { run } from './lib/run.mjs';

const MODELS = ['examples/models/thermal-qubit.json', 'examples/models/five-point-chain.json'];

await main(async () => {
  await ensureInstalled();
  await ensureBundle();
  for (const model of MODELS) {
    process.stdout.write(`\n$ npx thalweg constants ${model}\n`);
    const code = await run(process.execPath, [join(root, 'apps/cli/bin/thalweg.js'), 'constants', model]);
    if (code !== 0) return code;
  }
  return 0;
});
