import type { Grammar, OptionGrammar, Values } from './grammar.js';

/**
 * Completion for bash. Where nothing is offered bash completes file names (`complete -o default`), so file arguments need
 * no words of their own.
 */
export function bashScript(grammar: Grammar): string {
  const verbs = grammar.verbs.map((verb) => verb.name);
  const everyOption = [...grammar.options, ...grammar.verbs.flatMap((verb) => verb.options)];
  const withValue = [...new Set(everyOption.filter((option) => option.takesValue).flatMap((option) => option.flags))];
  return `# bash completion for thalweg: source <(thalweg completion bash)
_thalweg() {
  local current="\${COMP_WORDS[COMP_CWORD]}" previous="\${COMP_WORDS[COMP_CWORD - 1]}"
  local verb="" position=0 skip="" word
  COMPREPLY=()
  for word in "\${COMP_WORDS[@]:1:COMP_CWORD - 1}"; do
    if [[ -n $skip ]]; then skip=""; continue; fi
    case "$word" in
      ${withValue.join('|')}) skip=1 ;;
      -?*) ;;
      *) if [[ -z $verb ]]; then verb="$word"; else position=$((position + 1)); fi ;;
    esac
  done
  case "$verb:$previous" in
${valueCases(grammar)}
  esac
  [[ -n $skip ]] && return 0
  case "$verb" in
    "")
      if [[ $current == -* ]]; then _thalweg_offer "${flags(grammar.options)} --help --version"
      else _thalweg_offer "${verbs.join(' ')} help"; fi
      ;;
    help) _thalweg_offer "${verbs.join(' ')}" ;;
${grammar.verbs.map((verb) => verbCase(verb.name, verb.positions, [...verb.options, ...grammar.options])).join('\n')}
  esac
  return 0
}
_thalweg_offer() {
  local IFS=$' \\t\\n'
  COMPREPLY=($(compgen -W "$1" -- "$current" || true))
}
complete -o default -F _thalweg thalweg
`;
}

function valueCases(grammar: Grammar): string {
  const cases = grammar.options.flatMap((option) => valueCase('*', option));
  for (const verb of grammar.verbs) cases.push(...verb.options.flatMap((option) => valueCase(verb.name, option)));
  return cases.join('\n');
}

function valueCase(verb: string, option: OptionGrammar): string[] {
  if (option.values?.kind !== 'words') return [];
  const patterns = option.flags.map((flag) => `${verb}:${flag}`).join('|');
  return [`    ${patterns}) _thalweg_offer "${option.values.words.join(' ')}"; return 0 ;;`];
}

function verbCase(name: string, positions: readonly { values: Values }[], options: readonly OptionGrammar[]): string {
  const offers = positions.flatMap(({ values }, index) =>
    values?.kind === 'words'
      ? [`elif [[ $position == ${index} ]]; then _thalweg_offer "${values.words.join(' ')}"`]
      : [],
  );
  const branches = [`if [[ $current == -* ]]; then _thalweg_offer "${flags(options)}"`, ...offers];
  return `    ${name})\n      ${branches.join('\n      ')}; fi\n      ;;`;
}

function flags(options: readonly OptionGrammar[]): string {
  return options.flatMap((option) => option.flags).join(' ');
}
