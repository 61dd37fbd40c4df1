import { describe, expect, it } from 'vitest';
import { seededRandom } from '../../src/random.js';
import { type Objective, minimiseBfgs } from '../../src/search/bfgs.js';

describe('minimiseBfgs on smooth functions', () => {
  it('solves a quadratic whose curvatures span ten decades', () => {
    const n = 8;
    const scales = Array.from({ length: n }, (_, i) => 10 ** ((10 * i) / (n - 1) - 5));
    const objective: Objective = (x, g) => {
      let value = 0;
      for (let i = 0; i < n; i++) {
        value += 0.5 * scales[i] * (x[i] - 1) ** 2;
        g[i] = scales[i] * (x[i] - 1);
      }
      return value;
    };
    const result = minimiseBfgs(objective, new Float64Array(n), { gradientTolerance: 1e-12, valueTolerance: 0 });
    expect(result.value).toBeLessThan(1e-18);
    expect(Math.max(...Array.from(result.x, (v) => Math.abs(v - 1)))).toBeLessThan(1e-6);
    expect(result.iterations).toBeLessThan(300);
  });

  it('reaches the minimum of the Rosenbrock function in ten variables', () => {
    const result = minimiseBfgs(rosenbrock, new Float64Array(10).fill(-0.5), { maxIterations: 2000 });
    expect(result.value).toBeLessThan(1e-18);
    expect(Math.abs(result.x[9] - 1)).toBeLessThan(1e-7);
  });

  it('gives the same bytes for the same start', () => {
    const start = Float64Array.from([-1.2, 1, 0.3]);
    expect(minimiseBfgs(rosenbrock, start)).toEqual(minimiseBfgs(rosenbrock, start));
    expect([...start]).toEqual([-1.2, 1, 0.3]);
  });

  it('survives infinite values outside the domain', () => {
    // −log x + x on x > 0, from a start where the first step leaves the domain.
    const objective: Objective = (x, g) => {
      if (x[0] <= 0) return Infinity;
      g[0] = 1 - 1 / x[0];
      return x[0] - Math.log(x[0]);
    };
    const result = minimiseBfgs(objective, Float64Array.from([50]));
    expect(Math.abs(result.x[0] - 1)).toBeLessThan(1e-7);
    expect(Math.abs(result.value - 1)).toBeLessThan(1e-14);
  });
});

describe('minimiseBfgs on non-smooth functions', () => {
  it('minimises a weighted sum of |x_i − i| to rounding', () => {
    const objective: Objective = (x, g) => {
      let value = 0;
      for (let i = 0; i < x.length; i++) {
        value += (i + 1) * Math.abs(x[i] - i);
        g[i] = (i + 1) * Math.sign(x[i] - i);
      }
      return value;
    };
    const random = seededRandom(11);
    for (let trial = 0; trial < 5; trial++) {
      const x0 = Float64Array.from({ length: 5 }, () => 3 * random.normal());
      expect(minimiseBfgs(objective, x0, { maxIterations: 3000 }).value).toBeLessThan(1e-8);
    }
  });

  it('minimises the maximum of quadratics, whose minimum 0.5 sits on the kink of both', () => {
    // max(|x − a|², |x + a|²)/2 with |a| = 1: minimal at 0, value ½.
    const n = 4;
    const objective: Objective = (x, g) => {
      let plus = 0;
      let minus = 0;
      for (let i = 0; i < n; i++) {
        plus += 0.5 * (x[i] - 0.5) ** 2;
        minus += 0.5 * (x[i] + 0.5) ** 2;
      }
      const sign = plus > minus ? -1 : 1;
      for (let i = 0; i < n; i++) g[i] = x[i] + 0.5 * sign;
      return Math.max(plus, minus);
    };
    const result = minimiseBfgs(objective, Float64Array.from([1, -2, 0.7, 0.1]), { maxIterations: 1000 });
    expect(Math.abs(result.value - 0.5)).toBeLessThan(1e-9);
  });

  it('minimises the largest eigenvalue style function |x| + 100 y² + |x − y| at the origin', () => {
    const objective: Objective = ([x, y], g) => {
      g[0] = Math.sign(x) + Math.sign(x - y);
      g[1] = 200 * y - Math.sign(x - y);
      return Math.abs(x) + 100 * y * y + Math.abs(x - y);
    };
    expect(minimiseBfgs(objective, Float64Array.from([3.3, -1.7]), { maxIterations: 1000 }).value).toBeLessThan(1e-9);
  });
});

describe('minimiseBfgs ends honestly', () => {
  it('names the reason', () => {
    const flat: Objective = (_, g) => {
      g.fill(0);
      return 3;
    };
    expect(minimiseBfgs(flat, new Float64Array(2))).toMatchObject({ value: 3, reason: 'gradient', iterations: 0 });
    expect(minimiseBfgs(rosenbrock, new Float64Array(4), { maxIterations: 3 })).toMatchObject({
      reason: 'iterations',
      iterations: 3,
    });
    const cliff: Objective = (x, g) => {
      g[0] = -1;
      return x[0] > 10 ? -Infinity : -x[0];
    };
    expect(minimiseBfgs(cliff, new Float64Array(1))).toMatchObject({ reason: 'unbounded', value: -Infinity });
  });

  it('stops when asked and keeps the best point', () => {
    let asked = 0;
    const result = minimiseBfgs(rosenbrock, new Float64Array(6).fill(-1), { stop: () => ++asked > 20 });
    expect(result.reason).toBe('stopped');
    expect(result.evaluations).toBe(21);
    const g = new Float64Array(6);
    expect(rosenbrock(result.x, g)).toBe(result.value);
  });

  it('refuses a start without a finite value', () => {
    expect(() => minimiseBfgs(() => NaN, new Float64Array(1))).toThrowError(/finite value at the start.*NaN/);
  });
});

function rosenbrock(x: Float64Array, g: Float64Array): number {
  let value = 0;
  g.fill(0);
  for (let i = 0; i + 1 < x.length; i++) {
    const bend = x[i + 1] - x[i] * x[i];
    value += 100 * bend * bend + (1 - x[i]) ** 2;
    g[i] += -400 * bend * x[i] - 2 * (1 - x[i]);
    g[i + 1] += 200 * bend;
  }
  return value;
}
