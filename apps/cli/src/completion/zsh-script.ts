import type { Grammar, OptionGrammar, Values, VerbGrammar } from './grammar.js';

/** Completion for zsh, through its `_arguments`. */
export function zshScript(grammar: Grammar): string {
  return `#compdef thalweg
# zsh completion for thalweg: thalweg completion zsh > "\${fpath[1]}/_thalweg", or source <(thalweg completion zsh)
_thalweg() {
  local curcontext="$curcontext" context state state_descr line
  typeset -A opt_args
  local -a common=(
${grammar.options.map((option) => `    ${optionSpec(option)}`).join('\n')}
  )
  _arguments -C -A '-*' $common '(- *)'{-V,--version}'[print the version]' '(- *)'{-h,--help}'[print help]' \\
    '1:verb:->verb' '*::arguments:->arguments'
  case $state in
    verb)
      local -a verbs=(
${grammar.verbs.map((verb) => `        ${quote(`${escapeColons(verb.name)}:${verb.summary}`)}`).join('\n')}
      )
      _describe verb verbs
      ;;
    arguments)
      case $line[1] in
${grammar.verbs.map(verbCase).join('\n')}
      esac
      ;;
  esac
}
if [[ \${funcstack[1]} == _thalweg ]]; then _thalweg "$@"; else compdef _thalweg thalweg; fi
`;
}

function verbCase(verb: VerbGrammar): string {
  const positions = verb.positions.map(({ name, values }, index) => quote(`${index + 1}:${name}:${action(values)}`));
  const specs = [...verb.options.map(optionSpec), ...positions];
  return `        ${verb.name})\n          _arguments $common \\\n            ${specs.join(' \\\n            ')}\n          ;;`;
}

function optionSpec(option: OptionGrammar): string {
  const exclusive = option.repeatable ? '' : `(${option.flags.join(' ')})`;
  const head = option.repeatable ? '*' : exclusive;
  const value = option.takesValue ? `:value:${action(option.values)}` : '';
  const tail = `[${option.description.replace(/[[\]\\:]/g, '\\$&')}]${value}`;
  if (option.flags.length === 1) return quote(`${head}${option.flags[0]}${tail}`);
  return `${quote(head)}{${option.flags.join(',')}}${quote(tail)}`;
}

function action(values: Values): string {
  if (values === null) return ' ';
  return values.kind === 'files' ? '_files' : `(${values.words.map(escapeColons).join(' ')})`;
}

function escapeColons(text: string): string {
  return text.replaceAll(':', '\\:');
}

function quote(text: string): string {
  return `'${text.replaceAll("'", "'\\''")}'`;
}
