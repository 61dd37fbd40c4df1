import { expect, it } from 'vitest';
import { completeBakryEmery } from '../../src/constants/bakry-emery.js';
import { carreDuChamp } from '../../src/constants/carre-du-champ.js';
import { unboundedDirection } from '../../src/constants/unbounded-direction.js';
import { depolarising, truncatedOscillator } from '../../src/families/index.js';
import type { Generator } from '../../src/generator/generator.js';

function directionOf(g: Generator): string | null {
  const forms = carreDuChamp(g);
  return unboundedDirection(forms, completeBakryEmery(forms));
}

it('names observables where cbe is −∞, and nothing where it is finite', () => {
  expect(directionOf(depolarising(2))).toBeNull();
  expect(directionOf(truncatedOscillator({ levels: 3, beta: 1 }))).toMatch(
    /^Γ vanishes and Γ₂ does not stay positive at A_\d = [−(]?[\d.]+/,
  );
});
