import { beforeAll, describe, expect, test } from 'vitest';
import { ensureBundle } from '../../packages/setup/lib/build.mjs';
import { expectOneMessage, expectRefusal, FLIP, folderWith, qubit } from './support/refusal.js';

beforeAll(ensureBundle);

const FILES = {
  'm.json': qubit([{ matrix: FLIP }, { matrix: { pauli: 'Z' } }]),
  'rho.json': [[0.5, 0], [0, 0.6]],
  'pure.json': [[1, 0], [0, 0]],
  'large.json': [[0.5, 0, 0], [0, 0.5, 0], [0, 0, 0]],
  'taken/x': '',
}; // prettier-ignore

describe('command lines that are refused', () => {
  test.each([
    ['no verb', [], 64, ['expected a verb, got none; thalweg --help lists them']],
    ['a mistyped verb', ['constnts', 'm.json'], 64, ['expected a verb, got "constnts"; did you mean "constants"?']],
    ['a mistyped option', ['constants', 'm.json', '--onyl', 'gap'], 64, ["unknown option '--onyl'", '--only']],
    ['a mistyped constant', ['constants', 'm.json', '--only', 'gpa'], 64, ['got "gpa"; did you mean "gap"?']],
    ['no model', ['constants'], 64, ['model']],
    ['a time that is none', ['constants', 'm.json', '--time-limit', 'soon'], 64, ['--time-limit: expected', 'got "soon"']],
    ['no claim', ['check', 'm.json'], 64, ['expected at least one claim, got none; add --at-least']],
    ['a claim without a number', ['check', 'm.json', '--at-least', 'ge=x'], 64, ['--at-least: expected', 'got "x"']],
    ['a constant without a witness', ['witness', 'm.json', 'gap'], 64, ['(ge, mlsi, clsi, lsi), got "gap"; thalweg constants']],
    ['one stream for two documents', ['verify', '-', '--model', '-'], 65, ['(at the top of standard input)']],
    ['a missing model', ['constants', 'nowhere.json'], 66, ['got nowhere.json: there is no such file; check']],
    ['a folder that is no example', ['constants', 'taken'], 65, ['expected the file example.json in an example package, got none; add it', 'in taken']],
    ['a missing state', ['witness', 'm.json', 'ge', '--at', 'nowhere.json'], 66, ['got nowhere.json: there is no such file']],
    ['a state of trace 1.1', ['witness', 'm.json', 'ge', '--at', 'rho.json'], 65, ['expected a state of trace 1, got 1.1; divide', 'of rho.json']],
    ['a pure state', ['witness', 'm.json', 'ge', '--at', 'pure.json'], 65, ['got a smallest eigenvalue of 0; mix in']],
    ['a state of three levels', ['witness', 'm.json', 'ge', '--at', 'large.json'], 65, ['expected a 2×2 density matrix', 'got 3×3; give', 'large.json']],
    ['a missing folder to write to', ['witness', 'm.json', 'ge', '-o', 'nowhere/w.json'], 73, ['got nowhere/w.json: the folder nowhere does not exist; nothing was computed']],
    ['a folder to write to', ['witness', 'm.json', 'ge', '-o', 'taken'], 73, ['got taken: it is a folder;']],
    ['a certificate into a missing folder', ['certify', 'm.json', 'cge', '-o', 'nowhere/c.json'], 73, ['the folder nowhere does not exist']],
    ['evidence that is a model', ['verify', 'm.json', '--model', 'm.json'], 65, ['got the text "thalweg.model/1"', '(at /schema of m.json)']],
  ] as const)('%s', async (_, args, exitCode, says) => {
    await expectRefusal(FILES, args, { exitCode, says });
  }); // prettier-ignore
});

describe('evidence', () => {
  test('is refused for another model, without a model, and from the stream that holds the model; refuted when its value is wrong', async () => {
    const { run, remove } = folderWith({ ...FILES, 'other.json': qubit([{ matrix: FLIP }]) });
    try {
      const made = await run(['witness', 'm.json', 'ge', '--json']);
      expect(made.exitCode).toBe(0);
      const { value } = JSON.parse(made.stdout) as { value: number };

      const other = await run(['verify', '-', '--model', 'other.json'], made.stdout);
      expect({ ...other, stderr: '' }).toEqual({ exitCode: 65, stdout: '', stderr: '' });
      expectOneMessage(other.stderr, [
        'expected the model with digest',
        ', got',
        'another model',
        '(at /model of standard input)',
      ]);

      const alone = await run(['verify', '-'], made.stdout);
      expect({ ...alone, stderr: '' }).toEqual({ exitCode: 64, stdout: '', stderr: '' });
      expectOneMessage(alone.stderr, ['expected --model', 'got none;']);

      const twice = await run(['verify', '-', '--model', '-'], made.stdout);
      expect({ ...twice, stderr: '' }).toEqual({ exitCode: 64, stdout: '', stderr: '' });
      expectOneMessage(twice.stderr, ['standard input can be read once; name a file']);

      const lower = made.stdout.replace(`"value": ${value}`, `"value": ${value - 0.25}`);
      const wrong = await run(['verify', '-', '--model', 'm.json'], lower);
      expect({ exitCode: wrong.exitCode, stderr: wrong.stderr }).toEqual({ exitCode: 1, stderr: '' });
      expect(wrong.stdout).toMatch(/^refuted +ge ≤ .*: the witness gives .*, not /);
    } finally {
      remove();
    }
  });
});
