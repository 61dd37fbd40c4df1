import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import { expect } from 'vitest';
import { startThalweg } from '../../../apps/cli/test/helpers/thalweg.js';

/** Files of a test, by name; objects are written as JSON. */
export type Files = Readonly<Record<string, string | Uint8Array | object>>;

/** What a refused command line is expected to say. */
export interface Refusal {
  readonly exitCode: number;
  /** Parts of the one message, in this order. */
  readonly says: readonly string[];
}

/** A folder of its own with the given files; `run` starts the command in it. */
export function folderWith(files: Files) {
  const folder = mkdtempSync(join(tmpdir(), 'thalweg-faults-'));
  for (const [name, content] of Object.entries(files)) {
    const path = join(folder, name);
    mkdirSync(dirname(path), { recursive: true });
    writeFileSync(
      path,
      content instanceof Uint8Array || typeof content === 'string' ? content : JSON.stringify(content),
    );
  }
  return {
    folder,
    list: () => readdirSync(folder, { recursive: true }).map(String).sort(),
    run: async (args: readonly string[], stdin?: string) => {
      const { exitCode, stdout, stderr } = await startThalweg(args, { cwd: folder, input: stdin ?? '' });
      return { exitCode, stdout: String(stdout), stderr: String(stderr) };
    },
    remove: () => rmSync(folder, { recursive: true, force: true }),
  };
}

/**
 * Runs a command line that must be refused: the right exit code, nothing on standard output, one line on standard error without
 * a stack, and no file more or less than before. Resolves to that line.
 */
export async function expectRefusal(files: Files, args: readonly string[], refusal: Refusal): Promise<string> {
  const { list, run, remove } = folderWith(files);
  try {
    const before = list();
    const { exitCode, stdout, stderr } = await run(args);
    expect({ exitCode, stdout }, stderr).toEqual({ exitCode: refusal.exitCode, stdout: '' });
    expectOneMessage(stderr, refusal.says);
    expect(list()).toEqual(before);
    return stderr;
  } finally {
    remove();
  }
}

/** One line, no stack, the parts in their order. */
export function expectOneMessage(stderr: string, says: readonly string[]): void {
  expect(stderr).toMatch(/^thalweg: [^\n]+\n$/);
  expect(stderr).not.toMatch(/\bat .*:\d+:\d+|internal error/);
  let from = 0;
  for (const part of says) {
    const at = stderr.indexOf(part, from);
    expect(at, `"${part}" in: ${stderr}`).toBeGreaterThanOrEqual(0);
    from = at + part.length;
  }
}

/** A document of the model schema. */
export function model(fields: object): object {
  return { schema: 'thalweg.model/1', ...fields };
}

/** A qubit with the given jumps. */
export function qubit(jumps: readonly object[], more: object = {}): object {
  return model({ algebra: [2], generator: { form: 'lindblad', jumps, ...more } });
}

export const FLIP = [
  [0, 1],
  [1, 0],
];
