import type { Grammar, OptionGrammar, VerbGrammar } from './grammar.js';

/** Completion for fish: one `complete` line for each verb and option. */
export function fishScript(grammar: Grammar): string {
  const names = grammar.verbs.map((verb) => verb.name).join(' ');
  const lines = [
    '# fish completion for thalweg: thalweg completion fish | source',
    `set -l verbs ${names}`,
    'complete -c thalweg -f',
    ...grammar.options.map((option) => optionLine('', option)),
    optionLine('', flag(['-h', '--help'], 'print help')),
    optionLine('not __fish_seen_subcommand_from $verbs', flag(['-V', '--version'], 'print the version')),
    ...grammar.verbs.map(
      ({ name, summary }) =>
        `complete -c thalweg -n "not __fish_seen_subcommand_from $verbs" -a ${name} -d ${quote(summary)}`,
    ),
    ...grammar.verbs.flatMap(verbLines),
  ];
  return `${lines.join('\n')}\n`;
}

function verbLines(verb: VerbGrammar): string[] {
  const condition = `__fish_seen_subcommand_from ${verb.name}`;
  const words = verb.positions.flatMap(({ values }) => (values?.kind === 'words' ? values.words : []));
  const lines = verb.options
    .filter((option) => !option.flags.includes('--help'))
    .map((option) => optionLine(condition, option));
  if (verb.positions.some(({ values }) => values?.kind === 'files'))
    lines.push(`complete -c thalweg -n "${condition}" -F`);
  if (words.length > 0) lines.push(`complete -c thalweg -n "${condition}" -a ${quote(words.join(' '))}`);
  return lines;
}

function optionLine(condition: string, option: OptionGrammar): string {
  const parts = ['complete -c thalweg'];
  if (condition !== '') parts.push(`-n "${condition}"`);
  for (const name of option.flags) parts.push(name.startsWith('--') ? `-l ${name.slice(2)}` : `-s ${name.slice(1)}`);
  if (option.takesValue) parts.push(option.values?.kind === 'files' ? '-r -F' : '-x');
  if (option.values?.kind === 'words') parts.push(`-a ${quote(option.values.words.join(' '))}`);
  return `${parts.join(' ')} -d ${quote(option.description)}`;
}

function flag(flags: readonly string[], description: string): OptionGrammar {
  return { flags, description, repeatable: false, takesValue: false, values: null };
}

function quote(text: string): string {
  return `'${text.replaceAll('\\', '\\\\').replaceAll("'", "\\'")}'`;
}
