import type { Complex } from '../matrix/complex.js';
import { cos, sin } from './trigonometric.js';

/** e^{2πik/n} for whole k and n ≥ 1, reduced to the first eighth of the circle, so that conjugates and negatives agree in every bit. */
export function rootOfUnity(k: number, n: number): Complex {
  if (!Number.isInteger(k) || !Number.isInteger(n) || n < 1) {
    throw new RangeError(`expected whole numbers k and n ≥ 1, got ${k} and ${n}`);
  }
  const turns = 8 * (((k % n) + n) % n);
  const eighth = Math.floor(turns / n);
  const odd = eighth % 2 === 1;
  const rest = turns - eighth * n;
  const angle = ((odd ? n - rest : rest) / n) * 0.7853981633974483;
  const [c, s] = rest === 0 && odd ? [Math.SQRT1_2, Math.SQRT1_2] : [cos(angle), sin(angle)];
  const [x, y] = odd ? [s, c] : [c, s];
  const quarter = Math.floor(eighth / 2);
  const [re, im] = quarter === 0 ? [x, y] : quarter === 1 ? [-y, x] : quarter === 2 ? [-x, -y] : [y, -x];
  return { re: re + 0, im: im + 0 };
}
