import { describe, expect, it } from 'vitest';
import { descent, type DescentData } from '../src/index.js';
import { elementsOf, expectSound, textBoxes } from './support/parse-picture.js';

const times = Array.from({ length: 41 }, (_, k) => k / 8);
const fall = (rate: number, start: number): number[] => times.map((t) => start * Math.exp(-rate * t));

function made(change: Partial<DescentData> = {}, rates = { entropy: 2, distance: 1 }): DescentData {
  const [entropy, distance] = [fall(rates.entropy, 0.7), fall(rates.distance, 1)];
  return {
    title: 'Two levels',
    primitive: true,
    points: times.map((time, k) => ({ time, entropy: entropy[k] ?? 0, distance: distance[k] ?? 0 })),
    bounds: [
      { constant: 'mlsi', quantity: 'entropy', values: fall(1.5, 0.7) },
      { constant: 'clsi', quantity: 'entropy', values: fall(1.5, 0.7) },
      { constant: 'gap', quantity: 'entropy', values: fall(2, 1) },
      { constant: 'ge', quantity: 'production', values: fall(1, 1) },
      { constant: 'mlsi', quantity: 'distance', values: fall(0.7, 1.2) },
    ],
    ...change,
  };
}

const textsOf = (svg: string): string[] => textBoxes(expectSound(svg)).map(({ text }) => text);

describe('the descent', () => {
  it('is sound; bounds that coincide share a line and its name', () => {
    const texts = textsOf(descent(made()));
    expect(texts).toEqual(expect.arrayContaining(['flow', 'mlsi, clsi', 'gap', 'relative entropy D(ρt‖σ), nats', 't']));
    expect(texts).not.toContain('ge');
  });

  it('tells start, end and bounds in words', () => {
    const words = elementsOf(expectSound(descent(made())), 'desc')[0]?.textContent ?? '';
    expect(words).toContain('Over time 0 to 5, relative entropy falls from 0.7 to 3.178·10^−5');
    expect(words).toContain('mlsi, clsi allows entropy 0.0003872 at the end.');
  });

  it('names its limit', () => {
    expect(textsOf(descent(made({ primitive: false })))).toContain('relative entropy D(ρt‖E†ρ), nats');
  });

  it.each([1e-9, 0.01, 1, 30, 200])('keeps its labels apart at a rate of %s', (rate) => {
    textsOf(descent(made({ bounds: [] }, { entropy: rate, distance: rate / 2 })));
    textsOf(descent(made({}, { entropy: rate, distance: rate / 2 })));
  });

  it.each([1e-12, 3e-5, 0.5, 12_345, 1e9])('has a time axis that can be read up to %s', (until) => {
    const data = made();
    textsOf(descent({ ...data, points: data.points.map((point) => ({ ...point, time: (point.time * until) / 5 })) }));
  });

  it('does not move from its limit, and says so', () => {
    const points = times.map((time) => ({ time, entropy: 0, distance: 0 }));
    const texts = textsOf(descent(made({ points, bounds: [] })));
    expect(texts.filter((text) => text === '0 at all times')).toHaveLength(2);
  });

  it('draws no value that is zero on a logarithmic scale', () => {
    const points = times.map((time, k) => ({
      time,
      entropy: k > 30 ? 0 : Math.exp(-k),
      distance: k > 30 ? 0 : Math.exp(-k / 2),
    }));
    textsOf(descent(made({ points })));
  });

  it('begins a bound where it holds', () => {
    const values = fall(1, 1).map((value, k) => (k === 0 ? null : value));
    textsOf(descent(made({ bounds: [{ constant: 'ge', quantity: 'entropy', values }] })));
  });

  it('keeps many bounds that end close to each other apart', () => {
    const constants = ['mlsi', 'clsi', 'gap', 'lsi', 'ge', 'cge'] as const;
    const bounds = constants.map((constant, k) => ({
      constant,
      quantity: 'entropy' as const,
      values: fall(2 - k / 100, 0.8),
    }));
    expect(textsOf(descent(made({ bounds })))).toEqual(expect.arrayContaining([...constants]));
  });
});
