import {
  blochDisc,
  curvatureOn,
  depolarising,
  analyse,
  evaluateRings,
  lowestPoint,
  metricOf,
  reliefGrid,
} from '@thalweg/core';
import { describe, expect, it } from 'vitest';
import { relief } from '../src/index.js';
import { contourLines } from '../src/relief/contour-lines.js';
import { chooseLevels } from '../src/relief/levels.js';
import { discField, discRelief } from './support/field.js';
import { elementsOf, expectSound, textBoxes } from './support/parse-picture.js';

const bowl = (x: number, y: number): number => 0.75 + (x - 0.2) ** 2 + 2 * (y + 0.1) ** 2;
const textsOf = (svg: string): string[] => textBoxes(expectSound(svg)).map(({ text }) => text);

describe('contour lines', () => {
  it.each([0.05, 0.3, 0.8])('of x² + y² at %s are one closed circle each, joined across the first ray', (level) => {
    const lines = contourLines(
      discField((x, y) => x ** 2 + y ** 2, 60, 120),
      level,
    );
    expect(lines).toHaveLength(1);
    expect(lines[0]?.closed).toBe(true);
    for (const [x, y] of lines[0]?.points ?? [])
      expect(Math.abs(Math.hypot(x, y) - Math.sqrt(level))).toBeLessThan(2e-3);
  });

  it('of x end at the last ring, before the rim', () => {
    const lines = contourLines(
      discField((x) => x),
      0.5,
    );
    expect(lines).toHaveLength(1);
    expect(lines[0]?.closed).toBe(false);
    const ends = [lines[0]?.points[0], lines[0]?.points.at(-1)].map((end) => Math.hypot(...(end ?? [0, 0])));
    for (const radius of ends) expect(Math.abs(radius - 0.9999)).toBeLessThan(1e-3);
    for (const [x] of lines[0]?.points ?? []) expect(Math.abs(x - 0.5)).toBeLessThan(2e-3);
  });

  it('stop where κ is not defined', () => {
    const lines = contourLines(
      discField((x, y) => (y > 0.3 ? null : x ** 2 + y ** 2)),
      0.36,
    );
    for (const { points } of lines) for (const [, y] of points) expect(y).toBeLessThanOrEqual(0.35);
    expect(lines.length).toBeGreaterThan(0);
  });

  it('of a depolarising qubit are circles at the radius where κ has their value', () => {
    const structure = analyse(depolarising(2));
    const slice = blochDisc(structure.algebra, ['x', 'y']);
    const model = metricOf(structure);
    const grid = reliefGrid(slice, 4000);
    const kappa = Array.from(evaluateRings(model, 'logarithmic', slice, grid, [0, grid.rings]));
    const at = curvatureOn(model, 'logarithmic', slice);
    for (const level of [1.05, 1.2, 1.6]) {
      const [line, ...others] = contourLines({ ...grid, kappa }, level);
      expect(others).toEqual([]);
      expect(line?.closed).toBe(true);
      const radii = (line?.points ?? []).map(([x, y]) => Math.hypot(x, y));
      expect(Math.max(...radii) - Math.min(...radii)).toBeLessThan(1e-3);
      // Linear between rings: the value on the line is the level to the second order in their distance.
      for (const r of radii) expect(Math.abs(at(r, 0) - level)).toBeLessThan(0.01);
    }
  });
});

describe('levels', () => {
  it('are even where most of the area is, whatever κ does at the rim', () => {
    const levels = chooseLevels(discField((x, y) => 1 + x ** 2 + y ** 2 + 1e-4 / (1 - Math.hypot(x, y)) ** 2));
    expect(levels?.step).toBe(0.1);
    expect(levels?.doubledAbove).toBe(true);
    expect(levels?.doubledBelow).toBe(false);
    expect(levels?.values.length).toBeLessThan(25);
    expect(levels?.values.filter(({ level }) => level < 1.9).length).toBeGreaterThan(5);
  });

  it('fall to −∞ at the rim by doubled steps as well', () => {
    const levels = chooseLevels(discField((x, y) => -x - 1e-3 / (1 - Math.hypot(x, y)) ** 2));
    expect(levels?.doubledBelow).toBe(true);
    expect(levels?.doubledAbove).toBe(false);
  });

  it('are none where κ is the same everywhere', () => {
    expect(chooseLevels(discField(() => 0.5))).toBeNull();
    expect(chooseLevels(discField((x) => 0.5 + 1e-12 * x))).toBeNull();
  });
});

describe('the picture', () => {
  it('is sound, and names its lowest point and the reference state', () => {
    const texts = textsOf(relief(discRelief(bowl)));
    expect(texts).toEqual(expect.arrayContaining(['κ = 0.75', 'σ', 'x', 'z', '−1', '0.5']));
    expect(texts.some((text) => text.startsWith('Contours every 0.2'))).toBe(true);
  });

  it('tells the same in words', () => {
    const document = expectSound(relief(discRelief(bowl)));
    const words = elementsOf(document, 'desc')[0]?.textContent;
    expect(words).toMatch(/lowest is 0\.75 at \(0\.2, −0\.1\).*reference state lies at \(0, 0\.4\)/s);
  });

  it('says what is constant instead of drawing nothing', () => {
    const texts = textsOf(relief(discRelief(() => 0.5, { lowest: { x: 0, y: 0, kappa: 0.5, atRim: false } })));
    expect(texts).toContain('κ = 0.5 everywhere');
    expect(texts.some((text) => text.startsWith('Contours'))).toBe(false);
  });

  it('says where κ is missing', () => {
    const texts = textsOf(relief(discRelief((x, y) => (x > 0.7 ? null : bowl(x, y)))));
    expect(texts.join(' ')).toMatch(/No lines where κ is not resolved in double precision \(\d+ states\)/);
    const nowhere = relief(discRelief(() => null, { lowest: null, reference: null }));
    expect(textsOf(nowhere)).toContain('κ is not resolved here');
  });

  it('keeps the names of marks that share a place apart', () => {
    const marks = [
      { name: 'witness', x: 0.2, y: -0.1 },
      { name: 'a-state-with-a-very-long-name-indeed', x: 0.97, y: 0.1 },
    ];
    const slice = { kind: 'plane' as const, axes: ['', ''] as const, marks };
    const texts = textsOf(relief(discRelief(bowl, { slice, reference: { x: 0.2, y: -0.1 } })));
    expect(texts).toEqual(expect.arrayContaining(['κ = 0.75', 'σ', 'witness']));
  });

  it('survives titles that are empty, long or hostile', () => {
    for (const title of ['', 'x'.repeat(500), '<script>alert("&")</script> \u0000\u0007\ud800', 'ρ→σ '.repeat(60)]) {
      const document = expectSound(relief(discRelief(bowl, { title })));
      expect(elementsOf(document, 'script')).toEqual([]);
    }
  });

  it('leaves its colours to the page where it does not stand alone', () => {
    const inPage = relief(discRelief(bowl), { standalone: false, id: 'emblem' });
    expect(inPage).not.toContain('<style>');
    expect(inPage).toContain('id="emblem-title"');
    expect(relief(discRelief(bowl))).toContain('prefers-color-scheme:dark');
  });

  it('has the same bytes for the same data', () => {
    expect(relief(discRelief(bowl))).toBe(relief(discRelief(bowl)));
  });

  it('looks as it did', () => {
    const grid = discField((x, y) => 1 + x ** 2 + y ** 2, 5, 24);
    const small = discRelief(bowl, { grid: { ...grid, rimX: [0, -1, 0, 1], rimY: [1, 0, -1, 0] } });
    expect(relief(small, { standalone: false }).replaceAll('><', '>\n<')).toMatchSnapshot();
  });
});

it('marks the minimum of a real model where the search finds it', () => {
  const structure = analyse(depolarising(2));
  const slice = blochDisc(structure.algebra, ['x', 'z']);
  const model = metricOf(structure);
  const grid = reliefGrid(slice, 1000);
  const values = evaluateRings(model, 'logarithmic', slice, grid, [0, grid.rings]);
  const lowest = lowestPoint(model, 'logarithmic', slice, grid, values);
  expect(textsOf(relief(discRelief(bowl, { grid: { ...grid, kappa: Array.from(values) }, lowest })))).toContain(
    'κ = 1',
  );
});
