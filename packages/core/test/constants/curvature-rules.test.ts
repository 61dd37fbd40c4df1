import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { completeCurvatureRule, curvatureRule } from '../../src/constants/curvature-rules.js';
import {
  completeGraph,
  cycle,
  depolarising,
  fermionicNumber,
  pauliJumps,
  thermalQubit,
} from '../../src/families/index.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import { tensorGenerator } from '../../src/generator/tensor-generator.js';
import { analyse } from '../../src/structure/structure.js';
import { expectWithin } from '../helpers/bracket-of.js';

describe('rules for lower ends of cge', () => {
  it('identity minus expectation: half the rate, onto any subalgebra', () => {
    expectWithin(completeCurvatureRule(analyse(depolarising(3, 2)))?.value, 1, 1e-12, 'rate 2');
    const onto = { blocks: [2, 1] };
    const g = expectationGenerator({ algebra: blockAlgebra([3]), onto, rate: 0.7 });
    expectWithin(completeCurvatureRule(analyse(g))?.value, 0.35, 1e-12, 'onto [2,1]');
  });

  it('tensor products: the least factor', () => {
    const factors = [
      depolarising(3, 3),
      pauliJumps([
        { string: 'X', rate: 1 },
        { string: 'Z', rate: 1 },
      ]),
    ];
    const end = completeCurvatureRule(analyse(tensorGenerator(factors)));
    expectWithin(end?.value, 1, 1e-12, 'min(3/2, 1)');
    expect(end?.by).toContain('tensor product');
  });

  it('commuting or anticommuting reflections: four times the least square', () => {
    const unequal = pauliJumps([
      { string: 'X', rate: 1 },
      { string: 'Z', rate: 0.3 },
    ]);
    expectWithin(completeCurvatureRule(analyse(unequal))?.value, 0.3, 1e-12, 'V² = 0.3/4');
    expectWithin(completeCurvatureRule(analyse(fermionicNumber(2)))?.value, 1, 1e-12, 'Clifford generators');
  });

  it('give nothing where their hypotheses fail', () => {
    expect(completeCurvatureRule(analyse(thermalQubit({ beta: 1 })))).toBeNull();
    expect(completeCurvatureRule(analyse(cycle(5)))).toBeNull();
    expect(completeCurvatureRule(analyse(tensorGenerator([depolarising(2), thermalQubit({ beta: 1 })])))).toBeNull();
    expect(curvatureRule(analyse(cycle(3)))?.value ?? null).not.toBe(1);
    expect(curvatureRule(analyse(thermalQubit({ beta: 1 })))).toBeNull();
  });

  it('the rule for ge alone: rate times 1/2 + 1/N for an expectation onto scalars', () => {
    expectWithin(curvatureRule(analyse(completeGraph(4, 0.5)))?.value, 2 * 0.75, 1e-11, 'rate 2, N = 4');
    const pinching = expectationGenerator({ algebra: blockAlgebra([3]), onto: { diagonal: true } });
    expect(curvatureRule(analyse(pinching))).toBeNull();
  });
});
