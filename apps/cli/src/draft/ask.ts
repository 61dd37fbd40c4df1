import { createInterface } from 'node:readline/promises';
import { ThalwegError } from '@thalweg/core';
import type { Terminal } from '../terminal.js';

/** One question: what is asked, what an empty answer means (null: it is asked again), and what is wrong with an answer. */
export interface Question {
  readonly text: string;
  readonly fallback: string | null;
  readonly fault: (answer: string) => string | null;
}

/** Asks questions on a terminal, again after an answer that does not fit. Throws `usage` when the input ends. */
export async function ask(questions: readonly Question[], { stdin, stderr }: Terminal): Promise<string[]> {
  const reader = createInterface({ input: stdin, terminal: false });
  const lines = reader[Symbol.asyncIterator]();
  const answers: string[] = [];
  try {
    for (const question of questions) answers.push(await askOne(question, lines, (text) => stderr.write(text)));
  } finally {
    reader.close();
  }
  return answers;
}

async function askOne(
  { text, fallback, fault }: Question,
  lines: AsyncIterator<string>,
  write: (text: string) => unknown,
): Promise<string> {
  for (;;) {
    write(fallback === null ? `${text}: ` : `${text} [${fallback}]: `);
    const line = await lines.next();
    if (line.done === true)
      throw new ThalwegError('usage', `expected an answer (${text}), got the end of the input; start again`);
    const given = line.value.trim();
    const answer = given === '' && fallback !== null ? fallback : given;
    const wrong = fault(answer);
    if (wrong === null) return answer;
    write(`  ${wrong}\n`);
  }
}
