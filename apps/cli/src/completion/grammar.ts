import type { Argument, Command, Option } from 'commander';

/** What a value may be completed with: file names, fixed words, or nothing that is known. */
export type Values = { readonly kind: 'files' } | { readonly kind: 'words'; readonly words: readonly string[] } | null;

export interface OptionGrammar {
  /** All spellings, such as `-o` and `--output`. */
  readonly flags: readonly string[];
  readonly description: string;
  readonly repeatable: boolean;
  /** Whether a value follows, and what completes it. */
  readonly takesValue: boolean;
  readonly values: Values;
}

export interface VerbGrammar {
  readonly name: string;
  readonly summary: string;
  readonly positions: readonly { readonly name: string; readonly values: Values }[];
  readonly options: readonly OptionGrammar[];
}

export interface Grammar {
  readonly verbs: readonly VerbGrammar[];
  /** Options that every verb takes. */
  readonly options: readonly OptionGrammar[];
}

/** Names of placeholders that stand for a file. */
const FILE_PLACEHOLDERS = ['model', 'example', 'evidence', 'state', 'file', 'folder'];

/** Reads verbs, arguments and options off the parser, so that completion knows exactly what parsing accepts. */
export function describeGrammar(program: Command): Grammar {
  const help = program.createHelp();
  return {
    verbs: program.commands.map((command) => ({
      name: command.name(),
      summary: command.summary(),
      positions: command.registeredArguments.map((argument) => ({
        name: argument.name(),
        values: valuesOf(argument, argument.name()),
      })),
      options: help.visibleOptions(command).map(describeOption),
    })),
    options: program.options.filter((option) => option.long !== '--version').map(describeOption),
  };
}

function describeOption(option: Option): OptionGrammar {
  const placeholder = /<([^>]+)>/.exec(option.flags)?.[1] ?? '';
  return {
    flags: [option.short, option.long].filter((flag) => flag !== undefined && flag !== null),
    description: option.description,
    repeatable: option.parseArg !== undefined,
    takesValue: option.required,
    values: valuesOf(option, placeholder),
  };
}

function valuesOf(source: Argument | Option, placeholder: string): Values {
  if (source.argChoices !== undefined) return { kind: 'words', words: source.argChoices };
  return FILE_PLACEHOLDERS.includes(placeholder) ? { kind: 'files' } : null;
}
