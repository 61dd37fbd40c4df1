import { spawn } from 'node:child_process';
import { root } from './paths.mjs';

/** Runs a program with the terminal handed through; resolves to its exit code (128 + n when a signal n ended it). */
export function run(program, args, options = {}) {
  return execute(program, args, { stdio: 'inherit', ...options }).then((result) => result.code);
}

/** Runs a program and resolves to { code, output }, output being stdout and stderr in the order they came. */
export function capture(program, args, options = {}) {
  return execute(program, args, { stdio: ['ignore', 'pipe', 'pipe'], ...options });
}

/** Runs a script of this Node.js installation's own npm, also when npm is not on the path. */
export function runNpm(args, options = {}) {
  const npm = process.env.npm_execpath;
  if (npm && /\.[cm]?js$/.test(npm)) return run(process.execPath, [npm, ...args], options);
  return run('npm', args, { shell: process.platform === 'win32', ...options });
}

function execute(program, args, options) {
  return new Promise((resolve, reject) => {
    const child = spawn(program, args, { cwd: root, ...options });
    let output = '';
    for (const stream of [child.stdout, child.stderr]) {
      stream?.setEncoding('utf8').on('data', (text) => {
        output += text;
      });
    }
    child.on('error', reject);
    child.on('close', (code, signal) => resolve({ code: code ?? signalExitCode(signal), output }));
  });
}

function signalExitCode(signal) {
  return signal === 'SIGINT' ? 130 : signal === 'SIGTERM' ? 143 : 137;
}
