import { bashScript } from './bash-script.js';
import { fishScript } from './fish-script.js';
import type { Grammar } from './grammar.js';
import type { Shell } from './shells.js';
import { zshScript } from './zsh-script.js';

/** The completion script of a shell. */
export function completionScript(shell: Shell, grammar: Grammar): string {
  return { bash: bashScript, zsh: zshScript, fish: fishScript }[shell](grammar);
}
