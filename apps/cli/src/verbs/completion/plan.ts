import * as z from 'zod';
import { SHELLS } from '../../completion/shells.js';
import { readName } from '../option-values.js';
import { parseOptions, textOption } from '../parse-options.js';
import type { RawOptions } from '../verb.js';

export type CompletionPlan = ReturnType<typeof planCompletion>;

/** `completion bash|zsh|fish`. */
export function planCompletion(raw: RawOptions) {
  return parseOptions(z.object({ shell: textOption((text) => readName('shell', text, SHELLS)) }), raw);
}
