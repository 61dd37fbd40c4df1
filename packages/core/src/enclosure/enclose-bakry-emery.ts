import { isCommutative } from '../algebra/block-algebra.js';
import {
  type ComplexIntervalMatrix,
  adjointComplexMatrix,
  complexPointMatrix,
  entryAt,
} from '../checker/arithmetic/interval-matrix.js';
import { multiplyComplexMatrix } from '../checker/arithmetic/interval-product.js';
import { type Interval, div } from '../checker/arithmetic/interval.js';
import type { BakryEmeryResult, CompleteBakryEmery } from '../constants/bakry-emery.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import { attempt } from './attempt.js';
import { formAtFirstVector } from './curvature-enclosure.js';
import { type BlockForms, type EnclosedForms, formsOnBlock } from './enclosed-forms.js';
import { formLowerEnd, rateOf } from './form-lower-end.js';
import { product, reduced } from './form-vectors.js';
import { ENCLOSURE_WIDTH } from './limits.js';

/** Proved ends of `be` or `cbe`; null where nothing was proved on that side. */
export interface EnclosedEnds {
  readonly lower: number | null;
  readonly upper: number | null;
}

/** Ends of `cbe`: Γ₂ − KΓ ⪰ 0 proved a little below the eigenvalue in every block, and its quotient at the eigenvector. */
export function encloseCompleteBakryEmery(forms: EnclosedForms, found: CompleteBakryEmery): EnclosedEnds {
  if (!Number.isFinite(found.value)) return NOTHING;
  const blocks = forms.structure.algebra.blocks.map((_, b) => formsOnBlock(forms, b));
  const size = forms.structure.algebra.blocks[found.block];
  return {
    lower: formLowerEnd(forms.structure, blocks, blocks, found.value),
    upper: provedAbove(blocks[found.block], reduced(forms, found.vector, size), found.value),
  };
}

/** Ends of `be`: below only where every vector is covered, by one-dimensional blocks or by unitary covariance. */
export function encloseBakryEmery(forms: EnclosedForms, found: BakryEmeryResult): EnclosedEnds {
  if (!Number.isFinite(found.value)) return NOTHING;
  const { algebra } = forms.structure;
  const at = found.psi.re.findIndex((x, i) => x !== 0 || found.psi.im[i] !== 0);
  const block = algebra.blockOf[at];
  const vector = reduced(forms, product(forms, found, block), algebra.blocks[block]);
  const upper = provedAbove(formsOnBlock(forms, block), vector, found.value);
  if (!found.complete) return { lower: null, upper };
  const blocks = algebra.blocks.map((_, b) => formsOnBlock(forms, b));
  const atFirst = blocks.map(({ gamma, gamma2 }, b) => ({
    gamma: formAtFirstVector(gamma, algebra.blocks[b]),
    gamma2: formAtFirstVector(gamma2, algebra.blocks[b]),
  }));
  return { lower: formLowerEnd(forms.structure, isCommutative(algebra) ? blocks : null, atFirst, found.value), upper };
}

const NOTHING: EnclosedEnds = { lower: null, upper: null };

/** Upper end of Γ₂(x,x)/Γ(x,x), if it is near the value expected. */
function provedAbove(forms: BlockForms, x: ComplexMatrix, value: number): number | null {
  const found = attempt(() => {
    const above = valueAt(forms.gamma2, x);
    const below = valueAt(forms.gamma, x);
    return below.lo > 0 ? div(above, below) : { lo: -Infinity, hi: Infinity };
  });
  const near = ENCLOSURE_WIDTH * Math.max(Math.abs(value), rateOf(forms));
  return found && Math.abs(found.hi - value) <= near ? found.hi : null;
}

function valueAt(form: ComplexIntervalMatrix, x: ComplexMatrix): Interval {
  const vector = complexPointMatrix(x);
  const image = multiplyComplexMatrix(form, vector);
  return entryAt(multiplyComplexMatrix(adjointComplexMatrix(vector), image), 0, 0).re;
}
