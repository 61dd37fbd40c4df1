import { checkTypes, ensureBundle } from './lib/build.mjs';
import { ensureInstalled } from './lib/install.mjs';
import { main } from './lib/main.mjs';

await main(async () => {
  await ensureInstalled();
  await ensureBundle();
  return (await checkTypes()).code;
});
