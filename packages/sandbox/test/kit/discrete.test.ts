import { finiteGroup, seededRandom } from '@thalweg/core';
import { expect, test } from 'vitest';
import * as kit from '../../src/kit/names.js';

test.each([kit.cyclicGroup(1), kit.cyclicGroup(6), kit.dihedralGroup(4), kit.symmetricGroup(3), kit.symmetricGroup(4)])(
  'a group has the table that its document means: $form',
  (group) => {
    const known = finiteGroup(group.form);
    expect(group.order).toBe(known.order);
    expect(group.table.flat()).toEqual([...known.product]);
    expect(group.inverse).toEqual([...known.inverse]);
    expect(group.identity).toBe(known.identity);
    expect(group.generators).toEqual(known.generators);
    expect(new Set(group.labels).size).toBe(group.order);
  },
);

test('word lengths', () => {
  expect(kit.wordLength(kit.cyclicGroup(6))).toEqual([0, 1, 2, 3, 2, 1]);
  expect(kit.wordLength(kit.symmetricGroup(3))).toEqual([0, 1, 1, 2, 2, 3]);
  expect(() => kit.wordLength(kit.cyclicGroup(6), [2, 4])).toThrow('that miss element 1');
});

test('graphs are symmetric, with the degrees that their names say', () => {
  const degrees = (rates: number[][]): number[] => rates.map((row) => row.reduce((a, b) => a + b, 0));
  const graphs: [number[][], number[]][] = [
    [kit.cycleGraph(5), [2, 2, 2, 2, 2]],
    [kit.pathGraph(4), [1, 2, 2, 1]],
    [kit.completeGraph(4, 0.25), [0.75, 0.75, 0.75, 0.75]],
    [kit.hypercubeGraph(3), new Array<number>(8).fill(3)],
    [kit.gridGraph([2, 3]), [2, 3, 2, 2, 3, 2]],
    [
      kit.edgeGraph(3, [
        [0, 1],
        [1, 2, 4],
      ]),
      [1, 5, 4],
    ],
  ];
  for (const [rates, expected] of graphs) {
    expect(degrees(rates)).toEqual(expected);
    expect(rates[0].map((_, y) => rates.map((row) => row[y]))).toEqual(rates);
  }
  expect(kit.birthDeathChain([1, 2], [3, 4])).toEqual([
    [0, 1, 0],
    [3, 0, 2],
    [0, 4, 0],
  ]);
  expect(kit.gridGraph([4])).toEqual(kit.pathGraph(4));
  expect(kit.gridGraph([2, 2, 2])).toEqual(kit.hypercubeGraph(3));
});

test('random numbers are those of xoshiro128** as the core has it', () => {
  const [mine, core] = [kit.random('seed'), seededRandom('seed')];
  for (let k = 0; k < 50; k++) {
    expect(mine.uniform()).toBe(core.uniform());
    expect(mine.integer(1000)).toBe(core.integer(1000));
    expect(mine.normal()).toBeCloseTo(core.normal(), 12);
  }
});
