import { fromCoordinates, offBlockResidual } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { seededRandom } from '../random.js';
import { INPUT_TOLERANCE } from '../tolerances.js';
import { applyUnprojected } from './apply-generator.js';
import { generatorNormBound } from './generator-norm.js';
import type { Generator } from './generator.js';

const PROBES = 3;

/**
 * Throws `algebra-not-preserved` unless L maps the algebra into itself. L is linear, so generic elements decide: three
 * seeded random ones are tried.
 */
export function requireAlgebraPreserved(g: Generator, pointer: string): Generator {
  if (g.algebra.blocks.length === 1) return g;
  const residual = preservationResidual(g);
  const scale = generatorNormBound(g);
  if (residual <= INPUT_TOLERANCE * scale) return g;
  throw new ThalwegError(
    'algebra-not-preserved',
    `expected a generator that maps the algebra with blocks [${g.algebra.blocks.join(', ')}] into itself, got entries of ` +
      `modulus ${residual.toPrecision(3)} outside the blocks; use the algebra [${g.algebra.size}] or jumps between blocks`,
    { pointer, details: { residual, scale } },
  );
}

/** Largest entry outside the blocks of L(A), over random A with standard normal coordinates. */
function preservationResidual(g: Generator): number {
  const random = seededRandom('algebra preserved');
  let worst = 0;
  for (let k = 0; k < PROBES; k++) {
    const x = Float64Array.from({ length: g.algebra.dimension }, () => random.normal());
    worst = Math.max(worst, offBlockResidual(g.algebra, applyUnprojected(g, fromCoordinates(g.algebra, x))));
  }
  return worst;
}
