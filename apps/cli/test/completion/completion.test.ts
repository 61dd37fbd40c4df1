import { expect, test } from 'vitest';
import { completionScript } from '../../src/completion/completion-script.js';
import { describeGrammar } from '../../src/completion/grammar.js';
import { SHELLS } from '../../src/completion/shells.js';
import { createProgram } from '../../src/program.js';

const program = createProgram(async () => undefined);
const grammar = describeGrammar(program);

test('the grammar holds every verb, argument and option of the parser', () => {
  expect(grammar.verbs.map((verb) => verb.name)).toEqual(program.commands.map((command) => command.name()));
  for (const command of program.commands) {
    const verb = grammar.verbs.find(({ name }) => name === command.name());
    expect(verb?.positions.map(({ name }) => name)).toEqual(command.registeredArguments.map((a) => a.name()));
    const flags = verb?.options.flatMap((option) => option.flags) ?? [];
    for (const option of command.options) expect(flags).toContain(option.long);
  }
});

test('values are completed with files, words or nothing', () => {
  const witness = grammar.verbs.find(({ name }) => name === 'witness');
  expect(witness?.positions[0]?.values).toEqual({ kind: 'files' });
  expect(witness?.positions[1]?.values).toMatchObject({
    kind: 'words',
    words: expect.arrayContaining(['cge', 'ge:left']),
  });
  const seed = grammar.options.find(({ flags }) => flags.includes('--seed'));
  expect(seed).toMatchObject({ takesValue: true, values: null });
});

test.each(SHELLS)('the %s script', (shell) => {
  expect(completionScript(shell, grammar)).toMatchSnapshot();
});
