import { beforeAll, expect, test } from 'vitest';
import { ensureScripts } from '../support/ensure-scripts.js';
import { runGenerator } from '../../src/node/index.js';

beforeAll(ensureScripts);

const parameters = { n: 3, name: 'a"\\', on: true };

test('a generator receives the parameters and the kit, and its value comes back as JSON', async () => {
  const source =
    'export default (parameters, kit) => ({ parameters, version: kit.version, zero: -0, none: undefined });';
  const { json } = await runGenerator({ source, parameters, want: 'model' });
  expect(JSON.parse(json)).toEqual({ parameters, version: '1.0.0', zero: 0 });
});

test('claims are called like the default export; where there are none the list is empty', async () => {
  const source = 'export default () => 1; export const claims = ({ n }) => [{ constant: "gap", value: n }];';
  expect(await runGenerator({ source, parameters, want: 'claims' })).toEqual({
    json: '[{"constant":"gap","value":3}]',
  });
  const without = await runGenerator({ source: 'export default () => 1;', parameters, want: 'claims' });
  expect(without).toEqual({ json: '[]' });
});

test('an error carries the message of the generator and its line', async () => {
  const source = '\n\nexport default (p) => {\n  return p.x.y;\n};';
  await expect(runGenerator({ source, parameters, want: 'model' })).rejects.toMatchObject({
    code: 'generator-failed',
    message: "generate.js, line 4: TypeError: cannot read property 'y' of undefined",
    details: { line: 4 },
  });
});
