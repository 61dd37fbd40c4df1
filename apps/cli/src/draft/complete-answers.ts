import { ThalwegError } from '@thalweg/core';
import { parseExample } from '@thalweg/format';
import type { Terminal } from '../terminal.js';
import { ask, type Question } from './ask.js';
import { draftDocument, type DraftAnswers } from './draft-files.js';

export type GivenAnswers = { readonly [Field in keyof DraftAnswers]: string | null };

const QUESTIONS: Record<keyof DraftAnswers, string> = {
  name: 'Name (a-z, 0-9, hyphens)',
  title: 'Title, one line',
  summary: 'Summary, a sentence or two',
  author: 'Author',
  orcid: 'ORCID iD (may stay empty)',
  affiliation: 'Affiliation (may stay empty)',
  licence: 'Licence (SPDX)',
};

const FIELDS = ['name', 'title', 'summary', 'author', 'orcid', 'affiliation', 'licence'] as const;
const MAY_STAY_EMPTY: ReadonlySet<string> = new Set(['orcid', 'affiliation']);

/**
 * The answers that options gave, the others asked for on a terminal. Elsewhere `fallbacks` stand in, and what has none is refused
 * with the name of its option. Throws `usage`.
 */
export async function completeAnswers(
  given: GivenAnswers,
  fallbacks: GivenAnswers,
  terminal: Terminal,
): Promise<DraftAnswers> {
  for (const field of FIELDS) {
    const wrong = given[field] === null ? null : faultOf(field, given[field] ?? '');
    if (wrong !== null) throw new ThalwegError('usage', `--${field}: ${wrong}`);
  }
  const answers =
    terminal.stdin.isTTY === true ? await askMissing(given, fallbacks, terminal) : { ...fallbacks, ...known(given) };
  const texts = FIELDS.map((field) => [field, required(field, answers[field] ?? null)]);
  return Object.fromEntries(texts) as DraftAnswers;
}

async function askMissing(
  given: GivenAnswers,
  fallbacks: GivenAnswers,
  terminal: Terminal,
): Promise<Partial<GivenAnswers>> {
  const missing = FIELDS.filter((field) => given[field] === null);
  const questions = missing.map((field): Question => ({
    text: QUESTIONS[field],
    fallback: fallbacks[field] ?? (MAY_STAY_EMPTY.has(field) ? '' : null),
    fault: (answer) => (answer === '' && MAY_STAY_EMPTY.has(field) ? null : faultOf(field, answer)),
  }));
  const answers = await ask(questions, terminal);
  return {
    ...known(given),
    ...Object.fromEntries(missing.map((field, k) => [field, answers[k] === '' ? null : answers[k]])),
  };
}

function known(given: GivenAnswers): Partial<GivenAnswers> {
  return Object.fromEntries(Object.entries(given).filter(([, value]) => value !== null));
}

function required(field: keyof DraftAnswers, answer: string | null): string | null {
  if (answer !== null || MAY_STAY_EMPTY.has(field)) return answer;
  throw new ThalwegError('usage', `expected --${field}, got none and no terminal to ask on; give it`);
}

/** What is wrong with one answer, by the schema of `example.json`; null for nothing. */
function faultOf(field: keyof DraftAnswers, answer: string): string | null {
  try {
    parseExample(JSON.stringify(draftDocument({ ...PLAIN, [field]: answer }, true)));
    return null;
  } catch (error) {
    if (error instanceof ThalwegError) return error.message;
    throw error;
  }
}

const PLAIN: DraftAnswers = {
  name: 'plain',
  title: 'T',
  summary: 'S',
  author: 'A',
  orcid: null,
  affiliation: null,
  licence: 'MIT',
};
