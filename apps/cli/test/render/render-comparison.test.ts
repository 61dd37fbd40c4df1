import { comparisonSchema, type ComparisonDocument } from '@thalweg/format';
import { expect, test } from 'vitest';
import { renderComparison } from '../../src/render/render-comparison.js';
import { plain } from './support/layouts.js';

const state = [
  [0.5, 0],
  [0, 0.5],
];

function document(more: Partial<ComparisonDocument>): ComparisonDocument {
  const notion = { error: 1e-4, aboveProved: true, state, against: state };
  return comparisonSchema.parse({
    schema: 'thalweg.comparison/1',
    model: {
      title: 'A qubit',
      digest: 'a'.repeat(64),
      dimension: 4,
      blocks: [2],
      symmetry: 'tracial',
      primitive: true,
    },
    curvature: {
      lower: { value: 1, grade: 'exact', by: 'a theorem' },
      upper: { value: 1.5, grade: 'observed', by: 'a search' },
    },
    notions: [
      { notion: 'gradient', value: 1.5, ...notion, error: 0 },
      { notion: 'evi', value: 1.50002, ...notion, time: 0.5 },
      { notion: 'convexity', value: 1.5, ...notion, time: 0.25, from: state },
    ],
    agree: true,
    inequalities: [
      {
        name: 'hwi',
        formula: 'D ≤ W√I − (K/2)W²',
        constant: 1,
        by: 'a theorem',
        pairs: 4,
        slack: 0.125,
        error: 0.001,
        relative: 0.5,
        status: 'holds',
        state,
        against: state,
      },
    ],
    pairs: 4,
    seed: 1,
    tool: { name: 'thalweg', version: '0.0.0' },
    ...more,
  });
}

test('the proved end, the three observed constants and the inequalities are shown', () => {
  const text = renderComparison(document({}), plain());
  expect(text).toContain('  ge, proved from 1.000000; upper end 1.500000\n');
  expect(text).toContain('  EVI                  1.500020   1.0e−4   not below the proved end\n');
  expect(text).toContain('  The notions agree within their errors.\n');
  expect(text).toContain('  hwi          0.125   0.00100   50.0 %              holds\n');
  expect(text).toContain('upper ends, no bounds from below');
});

test('a value below the proved end, and a disagreement, are said', () => {
  const [gradient, evi, convexity] = document({}).notions;
  if (!gradient || !evi || !convexity) throw new Error('expected three notions');
  const broken = { ...evi, value: 0.5, aboveProved: false };
  const text = renderComparison(document({ agree: false, notions: [gradient, broken, convexity] }), plain());
  expect(text).toContain('BELOW the proved end');
  expect(text).toContain('do not agree within their errors');
});
