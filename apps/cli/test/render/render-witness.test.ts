import { witnessSchema, type WitnessDocument } from '@thalweg/format';
import { expect, test } from 'vitest';
import { renderWitness } from '../../src/render/render-witness.js';
import { plain } from './support/layouts.js';

function witness(more: Partial<WitnessDocument>): WitnessDocument {
  return witnessSchema.parse({
    schema: 'thalweg.witness/1',
    model: 'c'.repeat(64),
    constant: 'ge',
    mean: 'left',
    value: 0.12345678,
    state: [
      [0.75, 0],
      [0, 0.25],
    ],
    observable: {
      re: [
        [0, 1],
        [1, 0],
      ],
      im: [
        [0, -0.5],
        [0.5, 0],
      ],
    },
    amplification: 1,
    ...more,
  });
}

test('the bound is rounded up, the state and the observable are shown', () => {
  expect(renderWitness(witness({}), plain())).toBe(
    [
      '  ge:left ≤ 0.123457, shown by this state and observable',
      '',
      '  state',
      '    0.750000   0',
      '    0          0.250000',
      '',
      '  observable',
      '    0                      1.000000 − 0.500000i',
      '    1.000000 + 0.500000i   0',
      '',
      `  model ${'c'.repeat(64)}`,
      '',
    ].join('\n'),
  );
});

test('an entropy constant has no observable, and may have an ancilla', () => {
  const text = renderWitness(
    witness({ constant: 'clsi', mean: undefined, observable: null, amplification: 2 }),
    plain(),
  );
  expect(text).toMatch(/^ {2}clsi ≤ 0\.123457, shown by this state with an ancilla of side 2\n/);
  expect(text).not.toContain('observable');
});

test('a large state is left to the document', () => {
  const state = Array.from({ length: 9 }, (_, i) => Array.from({ length: 9 }, (_, j) => (i === j ? 1 / 9 : 0)));
  expect(renderWitness(witness({ state, observable: null }), plain())).toContain(
    '    too large to show; --json or -o gives it\n',
  );
});
