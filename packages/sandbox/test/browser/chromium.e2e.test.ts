import { afterAll, beforeAll, expect, test } from 'vitest';
import { ensureScripts } from '../support/ensure-scripts.js';
import type { GeneratorRun } from '../../src/generator-run.js';
import type * as entryModule from '../../src/browser/index.js';
import { createSandbox, type Sandbox } from '../../src/node/index.js';
import { CORPUS } from '../hostile/corpus.js';
import { openPage, type BrowserPage } from '../support/browser-page.js';
import { SAMPLES } from '../support/samples.js';

/** What the page hands back: the JSON text, or the parts of the error. */
type Outcome = { json: string } | { code: string; message: string; pointer?: string };

/** A browser starts slowly on a busy machine. */
const START_LIMIT = 240_000;

let browser: BrowserPage;
let sandbox: Sandbox;

beforeAll(async () => {
  ensureScripts();
  sandbox = createSandbox();
  browser = await openPage();
}, START_LIMIT);

afterAll(async () => {
  sandbox?.close();
  await browser?.close();
});

/** Runs in the page, by the browser entry of the package. */
function runInChromium(run: GeneratorRun): Promise<Outcome> {
  return browser.page.evaluate(async (asked) => {
    const entry = (window as unknown as { sandboxEntry: typeof entryModule }).sandboxEntry;
    try {
      return await entry.runGenerator(asked);
    } catch (error) {
      const { code, message, pointer } = error as { code: string; message: string; pointer?: string };
      return { code, message, ...(pointer !== undefined && { pointer }) };
    }
  }, run);
}

test.each(Object.entries(SAMPLES))('%s: the same bytes in Node.js and in Chromium', async (_name, run) => {
  const [here, there] = [await sandbox.run(run), await runInChromium(run)];
  expect(here.json.length).toBeGreaterThan(100);
  expect(there).toEqual(here);
});

test('claims and an error come back as they do in Node.js', async () => {
  const source = 'export default (p) => p.x.y;\nexport const claims = ({ n }) => [{ value: n / 3 }];';
  const claims: GeneratorRun = { source, parameters: { n: 2 }, want: 'claims' };
  expect(await runInChromium(claims)).toEqual(await sandbox.run(claims));
  const failing: GeneratorRun = { source, parameters: { n: 2 }, want: 'model' };
  expect(await runInChromium(failing)).toEqual({
    code: 'generator-failed',
    message: "generate.js, line 1: TypeError: cannot read property 'y' of undefined",
  });
});

test.each(CORPUS)('hostile: $name', async ({ source, code, message, pointer, limits }) => {
  const outcome = await runInChromium({ source, parameters: { n: 2 }, want: 'model', limits });
  expect(outcome).toMatchObject({ code, ...(pointer !== undefined && { pointer }) });
  expect('message' in outcome && outcome.message).toContain(message);
  const healthy: GeneratorRun = { source: 'export default (p) => p;', parameters: { n: 2 }, want: 'model' };
  expect(await runInChromium(healthy)).toEqual({ json: '{"n":2}' });
});
