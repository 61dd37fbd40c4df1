import { runChecks } from './lib/checks.mjs';
import { ensureInstalled } from './lib/install.mjs';
import { main } from './lib/main.mjs';

await main(async () => {
  await ensureInstalled();
  const failed = await runChecks();
  return failed.length === 0 ? 0 : 1;
});
