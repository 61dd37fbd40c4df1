import { eigenvaluesGeneral, generatorMatrix, isMarkov, type CanonicalForm, type Structure } from '@thalweg/core';
import { encodeMatrix, type ReportDocument } from '@thalweg/format';
import type { DocumentSource } from '../../input/read-source.js';
import { TOOL } from '../../version.js';
import { analysedModel } from './model-cache.js';
import { modelSummary } from './model-summary.js';
import { symmetryNotes } from './symmetry-notes.js';

/** Up to this algebra dimension the whole spectrum and the state are given. */
const SPECTRUM_LIMIT = 400;

/** Up to this algebra dimension the canonical jumps are written out. */
const JUMP_MATRIX_LIMIT = 100;

/** What `inspect` tells of a model, Markov semigroup or not. */
export function reportDocument({ source }: { readonly source: DocumentSource }): ReportDocument {
  const { structure, digest, document } = analysedModel(source);
  const { markov, state, fixedPoints, canonical } = structure;
  const { completelyPositive } = markov;
  const large = structure.algebra.dimension > SPECTRUM_LIMIT;
  const notes = [...structure.notes, ...symmetryNotes(structure), ...(large ? [TOO_LARGE] : [])];
  return {
    schema: 'thalweg.report/1',
    model: modelSummary(structure, digest, document.title),
    markov: {
      hermitian: { holds: markov.hermitian.holds, residual: markov.hermitian.residual },
      unital: { holds: markov.unital.holds, residual: markov.unital.residual },
      completelyPositive: {
        holds: completelyPositive.holds,
        smallestEigenvalue: completelyPositive.smallestEigenvalue,
        ...(completelyPositive.byForm && { byForm: true }),
      },
    },
    symmetry: symmetryPart(structure, digest),
    state: state && !large ? encodeMatrix(state.sigma) : null,
    fixedPoints: fixedPoints && { dimension: fixedPoints.dimension, blocks: [...fixedPoints.blocks] },
    primitive: fixedPoints?.primitive ?? null,
    jumps: canonical && jumpsOf(canonical),
    ...(canonical && { canonicalResidual: canonical.residual }),
    spectrum: large ? null : spectrumOf(structure),
    ...(notes.length === 0 ? {} : { notes }),
    tool: TOOL,
  };
}

const TOO_LARGE = `The state and the spectrum are left out above dimension ${SPECTRUM_LIMIT}.`;

/** Residuals are of products that need a faithful invariant state: without one there are none. */
function symmetryPart(structure: Structure, digest: string): ReportDocument['symmetry'] {
  const { markov, state, symmetry } = structure;
  const defined = isMarkov(markov) && state?.faithful;
  return {
    kind: modelSummary(structure, digest, undefined).symmetry,
    residuals: defined ? { ...symmetry.residuals } : {},
  };
}

function jumpsOf({ jumps, algebra }: CanonicalForm): NonNullable<ReportDocument['jumps']> {
  const small = algebra.dimension <= JUMP_MATRIX_LIMIT;
  return jumps.map((jump) => ({
    label: jump.label,
    frequency: jump.frequency,
    norm: jump.norm,
    ...(small && { matrix: encodeMatrix(jump.matrix) }),
  }));
}

/** Eigenvalues of −L on the algebra, by real part; rounding in the imaginary part is removed under KMS symmetry. */
function spectrumOf({ generator, algebra, symmetry }: Structure): (number | [number, number])[] {
  const { re, im } = eigenvaluesGeneral(generatorMatrix(generator), algebra.dimension);
  const real = symmetry.kind !== 'none';
  return Array.from(re, (x, k): [number, number] => [0 - x, real ? 0 : 0 - (im[k] ?? 0)])
    .sort((a, b) => a[0] - b[0] || a[1] - b[1])
    .map(([x, y]) => (y === 0 ? x : [x, y]));
}
