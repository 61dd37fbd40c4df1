import { spawn, type ChildProcess } from 'node:child_process';
import { realpathSync } from 'node:fs';
import type { Socket } from 'node:net';
import { tmpdir } from 'node:os';
import { fileURLToPath } from 'node:url';
import { timeFault } from '../engine/faults.js';
import type { CompleteRun } from '../generator-run.js';
import { GRACE_MILLISECONDS, PROCESS_HEAP_MEGABYTES, START_MILLISECONDS } from '../limits.js';
import type { Guarded } from '../pool.js';
import type { RunFault } from '../reply.js';
import { readLines } from './read-lines.js';

/** A reply is JSON text as a string of another JSON text, which escapes some characters, and little else. */
const replyBytes = (outputBytes: number): number => 2 * outputBytes + 2 ** 16;

/** One process that runs generators, one at a time. It is the boundary: empty environment, bounded heap and output, ended from outside. */
export class GuardedProcess implements Guarded {
  readonly #child: ChildProcess;
  readonly #ready: Promise<unknown>;
  #limit = replyBytes(0);
  #settle: ((reply: unknown) => void) | null = null;
  #ended: RunFault | null = null;

  constructor(script: URL) {
    this.#child = start(script);
    this.#child.on('error', (error) => this.#end(error.message));
    this.#child.on('exit', (code, signal) => this.#end(signal === null ? `exit code ${code}` : `signal ${signal}`));
    this.#child.stdin?.on('error', () => undefined);
    if (this.#child.stdout) {
      const overflow = (): void => this.#stop('it wrote too much');
      readLines(
        this.#child.stdout,
        (line) => this.#settle?.(parse(line)),
        () => this.#limit,
        overflow,
      );
    }
    this.#ready = this.#reply(START_MILLISECONDS, {
      code: 'internal',
      message: 'the sandbox did not start; try again',
    });
  }

  /** False after the process ended: it runs nothing more. */
  get alive(): boolean {
    return this.#ended === null;
  }

  /** Sends the run and resolves to whatever came back, or to a fault when the process ended or had to be ended. */
  async run(run: CompleteRun): Promise<unknown> {
    this.#hold(true);
    try {
      const ready = await this.#ready;
      if (ready !== 'ready') return ready;
      this.#limit = replyBytes(run.limits.outputBytes);
      this.#child.stdin?.write(`${JSON.stringify(run)}\n`);
      return await this.#reply(run.limits.milliseconds + 2 * GRACE_MILLISECONDS, timeFault(run.limits));
    } finally {
      this.#hold(false);
    }
  }

  /** Ends the process at once. */
  kill(): void {
    this.#stop('it was ended from outside');
  }

  /** The next line, or a fault: `late` when none comes in time, which ends the process. */
  #reply(milliseconds: number, late: RunFault): Promise<unknown> {
    return new Promise((resolve) => {
      const timer = setTimeout(() => this.#stop(late), milliseconds);
      this.#settle = (reply) => {
        clearTimeout(timer);
        this.#settle = null;
        resolve(reply);
      };
      if (this.#ended !== null) this.#settle({ fault: this.#ended });
    });
  }

  #stop(reason: string | RunFault): void {
    this.#end(reason);
    this.#child.kill('SIGKILL');
  }

  #end(reason: string | RunFault): void {
    this.#ended ??= typeof reason === 'string' ? endFault(reason) : reason;
    this.#settle?.({ fault: this.#ended });
  }

  /** Keeps this program running while the process has work, and not longer. */
  #hold(busy: boolean): void {
    for (const part of [this.#child, this.#child.stdin as Socket | null, this.#child.stdout as Socket | null]) {
      if (busy) part?.ref();
      else part?.unref();
    }
  }
}

function start(script: URL): ChildProcess {
  const path = realpathSync(fileURLToPath(script));
  const options = [`--max-old-space-size=${PROCESS_HEAP_MEGABYTES}`, '--no-warnings', ...permissions(path)];
  return spawn(process.execPath, [...options, path], {
    env: {},
    cwd: tmpdir(),
    stdio: ['pipe', 'pipe', 'ignore'],
    windowsHide: true,
  });
}

/** Where Node.js has a permission model: no file but the script, no process, and threads, one of which is needed. A comma or star in the path means more than itself. */
function permissions(script: string): string[] {
  const flag = ['--permission', '--experimental-permission'].find((name) =>
    process.allowedNodeEnvironmentFlags.has(name),
  );
  return flag === undefined || /[,*]/.test(script) ? [] : [flag, `--allow-fs-read=${script}`, '--allow-worker'];
}

function endFault(reason: string): RunFault {
  const message = `expected generate.js to run, but its process ended (${reason}); build a smaller model`;
  return { code: 'generator-failed', message };
}

function parse(line: string): unknown {
  try {
    return JSON.parse(line);
  } catch {
    return null;
  }
}
