import { CONSTANT_IDS, seededRandom, type Grade } from '@thalweg/core';
import { describe, expect, it } from 'vitest';
import { bracket, spectrum, type BracketRow } from '../src/index.js';
import { elementsOf, expectSound, textBoxes } from './support/parse-picture.js';

const textsOf = (svg: string): string[] => textBoxes(expectSound(svg)).map(({ text }) => text);
const end = (value: number, grade: Grade = 'certified') => ({ value, grade, margin: 1e-12 });
const row = (
  id: BracketRow['id'],
  lower: BracketRow['lower'],
  upper: BracketRow['upper'],
  closed = false,
): BracketRow => ({
  id,
  name: id,
  lower,
  upper,
  closed,
});
const drawn = (rows: readonly BracketRow[]): string =>
  bracket({ title: 'Two levels', convention: 'convention two-alpha: I ≥ 2αD', rows });

describe('the brackets of a sheet', () => {
  it('are sound and give the numbers of the sheet', () => {
    const texts = textsOf(
      drawn([
        row('gap', end(1), end(1), true),
        row('ge', end(0.75, 'exact'), end(0.9627109900123, 'observed')),
        row('mixing', end(4.6), end(6.9)),
      ]),
    );
    expect(texts).toEqual(
      expect.arrayContaining(['gap', '1.000000000', '0.750000', '0.962711', 'a time', 'observed only', 'closed']),
    );
  });

  it('show an unknown end as a dash and a dotted line, an unbounded one as an arrow', () => {
    const svg = drawn([
      row('ge', null, end(2)),
      row('cbe', end(-Infinity), end(-Infinity), true),
      row('be', end(-Infinity), end(1)),
    ]);
    const texts = textsOf(svg);
    expect(texts.filter((text) => text === '−∞')).toHaveLength(3);
    expect(texts).toEqual(expect.arrayContaining(['—', 'Dotted: the other end is not known.']));
  });

  it('say every bracket in words', () => {
    const words = elementsOf(
      expectSound(drawn([row('ge', end(0.5), end(2, 'observed')), row('cge', null, null)])),
      'desc',
    )[0]?.textContent;
    expect(words).toContain('ge: at least 0.500000 (certified), at most 2.000000 (observed).');
    expect(words).toContain('cge: nothing is known.');
  });

  it('do not let one far end flatten the others', () => {
    const rows = [
      row('gap', end(1), end(1), true),
      row('ge', end(0.5), end(1)),
      row('lsi', end(0.1), end(1e6, 'observed')),
    ];
    const ticks = textsOf(drawn(rows)).filter((text) => /^\d\.\d$/.test(text));
    expect(ticks).toContain('0.4');
  });

  it('keep their columns apart for seeded sheets of every size', () => {
    const random = seededRandom('bracket pictures');
    const grades: readonly Grade[] = ['exact', 'enclosed', 'certified', 'observed'];
    for (let run = 0; run < 60; run++) {
      const scale = 10 ** (random.integer(9) - 4);
      const rows = CONSTANT_IDS.slice(0, 1 + random.integer(11)).map((id) => {
        const [low, high] = [scale * random.normal(), scale * (1 + random.uniform())];
        const lower = random.integer(5) === 0 ? null : end(low, grades[random.integer(3)]);
        const upper = random.integer(6) === 0 ? null : end(Math.max(low, high), grades[random.integer(4)]);
        return row(id, lower, upper, lower !== null && upper !== null && random.integer(4) === 0);
      });
      textsOf(drawn(rows));
    }
  });
});

describe('the spectrum', () => {
  it('of a symmetric model is a line with multiplicities', () => {
    const texts = textsOf(spectrum({ title: 'Two levels', eigenvalues: [0, 0.5, 0.5 + 1e-12, 1] }));
    expect(texts).toEqual(
      expect.arrayContaining(['×2', 'slowest decay 0.5', 'All eigenvalues are real. ×n: n times.']),
    );
  });

  it('of another is the complex plane', () => {
    const document = expectSound(spectrum({ title: 'Driven', eigenvalues: [0, [0.5, 2], [0.5, -2], 1] }));
    expect(textBoxes(document).map(({ text }) => text)).toEqual(expect.arrayContaining(['Im', 'slowest decay 0.5']));
    expect(elementsOf(document, 'circle')).toHaveLength(4);
    expect(elementsOf(document, 'desc')[0]?.textContent).toContain('0.5 − 2i, 0.5 + 2i');
  });

  it('counts fixed points, and shows a model in which nothing moves', () => {
    expect(textsOf(spectrum({ title: '', eigenvalues: [0, 0, 1] }))).toContain(
      '0 with multiplicity 2: the fixed points.',
    );
    textsOf(spectrum({ title: 'Still', eigenvalues: [0, 0, 0, 0] }));
    textsOf(spectrum({ title: 'Rotation', eigenvalues: [0, 0, [0, 1], [0, -1]] }));
  });

  it('keeps labels apart for seeded spectra of every size', () => {
    const random = seededRandom('spectrum pictures');
    for (let run = 0; run < 40; run++) {
      const scale = 10 ** (random.integer(13) - 6);
      const count = 1 + random.integer(60);
      const real = Array.from(
        { length: count },
        () => scale * Math.round(20 * random.uniform()) * (1 + random.integer(2) * 1e-3),
      );
      textsOf(spectrum({ title: `Spectrum ${run}`, eigenvalues: [0, ...real] }));
      const complex = real.flatMap((re): [number, number][] => [[re, scale * random.normal()]]);
      textsOf(spectrum({ title: `Plane ${run}`, eigenvalues: [0, ...complex] }));
    }
  });
});
