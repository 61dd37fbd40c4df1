import type { MessagePort } from 'node:worker_threads';
import { ThalwegError } from '@thalweg/core';
import { recordError, type TaskReply, type TaskRegistry, type TaskRequest } from './protocol.js';

/** Answers task requests on a worker's port until it closes. */
export function serveTasks(registry: TaskRegistry, port: MessagePort): void {
  const reply = (message: TaskReply) => port.postMessage(message);
  port.on('message', (request: TaskRequest) => {
    const { index } = request;
    runTask(registry, request, (text) => reply({ kind: 'progress', index, text }))
      .then((result) => reply({ kind: 'done', index, result }))
      .catch((error: unknown) => reply({ kind: 'failed', index, error: recordError(error) }));
  });
}

async function runTask(registry: TaskRegistry, request: TaskRequest, progress: (text: string) => void) {
  const { name, input, deadline } = request;
  const task = Object.hasOwn(registry, name) ? registry[name] : undefined;
  if (task === undefined) throw new ThalwegError('internal', `expected a registered task, got "${name}"`);
  return await task(input, { progress, isOutOfTime: () => deadline !== null && Date.now() >= deadline });
}
