import type { SandboxLimits } from '../limits.js';
import type { RunFault, RunReply } from '../reply.js';
import type { InsideFault } from '../inside/describe-error.js';

export function timeFault({ milliseconds }: SandboxLimits): RunFault {
  const message = `expected generate.js to end within ${milliseconds} ms, it did not; look for an endless loop, or build a smaller model`;
  return { code: 'time-limit', message };
}

export function memoryFault({ memoryMegabytes }: SandboxLimits): RunFault {
  const message = `expected generate.js to use at most ${memoryMegabytes} MiB of memory, it asked for more; build a smaller model`;
  return { code: 'too-large', message };
}

/** The reply for what `generate` answered inside; null when the interpreter ran out of memory. */
export function readAnswer(answer: string | null, limits: SandboxLimits, memoryWasRefused: boolean): RunReply {
  if (answer === null) return { fault: memoryFault(limits) };
  if (answer.startsWith('=')) return withinOutput(answer.slice(1), limits);
  const fault = JSON.parse(answer.slice(1)) as InsideFault;
  if (fault.outOfMemory || (fault.isNull && memoryWasRefused)) return { fault: memoryFault(limits) };
  return { fault: insideFault(fault) };
}

function withinOutput(json: string, { outputBytes }: SandboxLimits): RunReply {
  const bytes = new TextEncoder().encode(json).length;
  if (bytes <= outputBytes) return { json };
  const message = `expected generate.js to return at most ${outputBytes} bytes of JSON, got ${bytes}; build a smaller model`;
  return { fault: { code: 'too-large', message } };
}

function insideFault({ message, pointer, line, column }: InsideFault): RunFault {
  const place = line === undefined ? '' : `, line ${line}`;
  return {
    code: 'generator-failed',
    message: `generate.js${place}: ${message}`,
    ...(pointer !== undefined && { pointer }),
    ...(line !== undefined && { line }),
    ...(column !== undefined && { column }),
  };
}
