import { distanceSchema, type DistanceDocument } from '@thalweg/format';
import { expect, test } from 'vitest';
import { renderDistance } from '../../src/render/render-distance.js';
import { plain } from './support/layouts.js';

const state = [
  [0.5, 0],
  [0, 0.5],
];

function document(more: Partial<DistanceDocument>): DistanceDocument {
  return distanceSchema.parse({
    schema: 'thalweg.distance/1',
    model: {
      title: 'A qubit',
      digest: 'a'.repeat(64),
      dimension: 4,
      blocks: [2],
      symmetry: 'tracial',
      primitive: true,
    },
    from: state,
    to: state,
    distance: {
      lower: { value: 1.23456789, grade: 'certified', by: 'a dual path', margin: 1e-12 },
      upper: { value: 1.23466789, grade: 'certified', by: 'a path' },
    },
    relativeWidth: 1e-4,
    reached: true,
    geodesic: {
      pieces: 8,
      speed: { least: 1.23, most: 1.24 },
      points: [
        { time: 0, state, entropy: 0.25, speed: 1.23 },
        { time: 1, state, entropy: 0, speed: 1.24 },
      ],
    },
    tool: { name: 'thalweg', version: '0.0.0' },
    ...more,
  });
}

test('both ends are rounded outwards, the geodesic is a table', () => {
  const text = renderDistance(document({ notes: ['A note.'] }), plain());
  expect(text).toContain('  1.234567 ≤ W ≤ 1.234668\n  lower   certified: a dual path (rounding 1.0e−12)\n');
  expect(text).toContain(
    '  t          D(ρ_t‖E†ρ)   speed\n  0          0.250000     1.230000\n  1.000000   0            1.240000\n',
  );
  expect(text).toContain('8 pieces; its speed varies by 0.00806');
  expect(text).toContain('  A note.\n');
});

test('an infinite distance says why', () => {
  const end = { value: null, grade: 'certified', by: 'unbounded', unbounded: 'above', note: 'E† differs' } as const;
  const text = renderDistance(document({ distance: { lower: end, upper: end }, geodesic: null }), plain());
  expect(text).toContain('  W = ∞\n  lower   certified: E† differs\n');
});

test('a lower end that is not known is zero', () => {
  const upper = { value: 2, grade: 'certified', by: 'a path' } as const;
  const text = renderDistance(document({ distance: { lower: null, upper }, geodesic: null, reached: false }), plain());
  expect(text).toContain('0 ≤ W ≤ 2.000000');
});

test('ends out of order are no document', () => {
  const end = (value: number) => ({ value, grade: 'certified', by: 'x' }) as const;
  expect(() => document({ distance: { lower: end(3), upper: end(2) } })).toThrow(
    /expected a lower end below the upper one 2, got 3/,
  );
});
