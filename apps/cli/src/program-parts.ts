import { CONSTANT_IDS, MEAN_NAMES } from '@thalweg/core';
import { Argument, type Command, Option } from 'commander';
import type { VerbName } from './verbs/load-verb.js';
import type { RawOptions } from './verbs/verb.js';

/** Called with the verb that was asked for, its arguments and all its options. */
export type RunVerb = (name: VerbName, raw: RawOptions) => Promise<void>;

/** What a constant may be called on the command line. */
export const CONSTANT_WORDS = [...CONSTANT_IDS, ...MEAN_NAMES.map((mean) => `ge:${mean}`)];

/** A verb with its summary; parsing hands its arguments and options to `runVerb`. */
export function addVerb(program: Command, runVerb: RunVerb, name: VerbName, summary: string): Command {
  return program
    .command(name)
    .description(`${summary[0]?.toUpperCase()}${summary.slice(1)}.`)
    .summary(summary)
    .helpOption('-h, --help', 'print this help')
    .action(async (...parameters: unknown[]) => {
      const command = parameters.at(-1) as Command;
      const values = command.registeredArguments.map((argument, k) => [argument.name(), command.args[k]]);
      await runVerb(name, { ...command.optsWithGlobals(), ...Object.fromEntries(values) });
    });
}

export function modelArgument(): Argument {
  return new Argument('<model>', 'model (JSON file, - for standard input) or example (folder, archive)');
}

export function exampleArgument(): Argument {
  return new Argument('<example>', 'folder with example.json, or archive');
}

export function setOption(): Option {
  return new Option('--set <name=value>', 'a parameter of the example (repeatable)').argParser(collect);
}

export function onlyOption(what: string): Option {
  return withWords(new Option('--only <constants>', what), CONSTANT_WORDS);
}

export function meanOption(): Option {
  return withDefault(withWords(new Option('--mean <name>', 'operator mean of ge'), MEAN_NAMES), MEAN_NAMES[0]);
}

/** Names the words that help and completion show; the verb's plan checks them. */
export function withWords<Target extends Argument | Option>(target: Target, words: readonly string[]): Target {
  target.argChoices = [...words];
  return target;
}

/** Says what an option is when it is left out; the verb's plan puts it there. */
export function withDefault(option: Option, text: string | undefined): Option {
  option.defaultValueDescription = text;
  return option;
}

export function collect(value: string, previous: string[] | undefined): string[] {
  return [...(previous ?? []), value];
}

export function examples(lines: readonly string[]): string {
  return `\nExamples:\n${lines.map((line) => `  ${line}`).join('\n')}`;
}
