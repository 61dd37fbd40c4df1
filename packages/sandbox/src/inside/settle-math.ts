import { cos, cosh, exp, expm1, log, log1p, pow, sin, sinh, tanh } from '../kit/names.js';

/** Those of the kit take the place of the engine's, whose last bit is its own. */
const SETTLED = { cos, cosh, exp, expm1, log, log1p, pow, sin, sinh, tanh };

/** The engine's own that the kit does not have. */
const REFUSED = ['acos', 'acosh', 'asin', 'asinh', 'atan', 'atan2', 'atanh', 'cbrt', 'hypot', 'log10', 'log2', 'tan'];

/** Leaves in `Math` only what gives the same bits everywhere; the rest throws and says so. */
export function settleMath(): void {
  Object.assign(Math, SETTLED);
  const refuse = (name: string, advice: string): void => {
    const refused = (): never => {
      throw new TypeError(`Math.${name} is not available: its result would depend on the engine; ${advice}`);
    };
    Object.assign(Math, { [name]: refused });
  };
  for (const name of REFUSED) refuse(name, 'write it with the functions of the kit');
  refuse('random', 'take kit.random(seed)');
}
