import { bracketText } from '@thalweg/core';
import type { WitnessDocument } from '@thalweg/format';
import { constantName } from './constant-name.js';
import { proseWidth, type Layout } from './layout.js';
import { matrixLines } from './matrix-lines.js';
import { wrap } from './wrap.js';

const INDENT = 4;

/** A witness for people: the value, the state and the observable. */
export function renderWitness(witness: WitnessDocument, layout: Layout): string {
  const { colours } = layout;
  const { constant, mean, value, amplification } = witness;
  const ancilla = amplification > 1 ? ` with an ancilla of side ${amplification}` : '';
  const bound = bracketText(null, { value }, false).upper ?? '';
  const what = witness.observable === null ? 'this state' : 'this state and observable';
  const head = `${constantName({ id: constant, mean })} ≤ ${bound}, shown by ${what}${ancilla}`;
  const lines = [
    ...wrap(head, proseWidth(layout), 2).map((line) => colours.bold(line)),
    ...part('state', witness.state, layout),
    ...(witness.observable === null ? [] : part('observable', witness.observable, layout)),
    '',
    ...wrap(`model ${witness.model}`, layout.width, 2).map((line) => colours.dim(line)),
  ];
  return `${lines.join('\n')}\n`;
}

function part(name: string, matrix: WitnessDocument['state'], { width }: Layout): string[] {
  return ['', `  ${name}`, ...(matrixLines(matrix, width, INDENT) ?? ['    too large to show; --json or -o gives it'])];
}
