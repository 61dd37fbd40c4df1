import { eigenvaluesGeneral, generatorMatrix, type Structure } from '@thalweg/core';
import { encodeMatrix, type ReportDocument } from '@thalweg/format';
import type { DocumentSource } from '../../input/read-source.js';
import { TOOL } from '../../version.js';
import { analysedModel } from './model-cache.js';
import { modelSummary } from './model-summary.js';

/** Up to this algebra dimension the whole spectrum is given. */
const SPECTRUM_LIMIT = 400;

/** What `inspect` tells of a model, Markov semigroup or not. */
export function reportDocument({ source }: { readonly source: DocumentSource }): ReportDocument {
  const { structure, digest, document } = analysedModel(source);
  const { markov, symmetry, state, fixedPoints, canonical, notes } = structure;
  const { completelyPositive } = markov;
  const large = structure.algebra.dimension > SPECTRUM_LIMIT;
  const allNotes = large ? [...notes, `The spectrum is left out above dimension ${SPECTRUM_LIMIT}.`] : [...notes];
  return {
    schema: 'thalweg.report/1',
    model: modelSummary(structure, digest, document.title),
    markov: {
      hermitian: { holds: markov.hermitian.holds, residual: markov.hermitian.residual },
      unital: { holds: markov.unital.holds, residual: markov.unital.residual },
      completelyPositive: {
        holds: completelyPositive.holds,
        smallestEigenvalue: completelyPositive.smallestEigenvalue,
      },
    },
    symmetry: {
      kind: modelSummary(structure, digest, undefined).symmetry,
      residuals: { ...symmetry.residuals },
    },
    state: state && !large ? encodeMatrix(state.sigma) : null,
    fixedPoints: fixedPoints && { dimension: fixedPoints.dimension, blocks: [...fixedPoints.blocks] },
    primitive: fixedPoints?.primitive ?? false,
    jumps: canonical && canonical.jumps.map(({ label, frequency, norm }) => ({ label, frequency, norm })),
    spectrum: large ? [] : spectrumOf(structure),
    ...(allNotes.length === 0 ? {} : { notes: allNotes }),
    tool: TOOL,
  };
}

/** Eigenvalues of −L on the algebra, by real part; rounding in the imaginary part is removed under KMS symmetry. */
function spectrumOf({ generator, algebra, symmetry }: Structure): (number | [number, number])[] {
  const { re, im } = eigenvaluesGeneral(generatorMatrix(generator), algebra.dimension);
  const real = symmetry.kind !== 'none';
  return Array.from(re, (x, k): [number, number] => [0 - x, real ? 0 : 0 - (im[k] ?? 0)])
    .sort((a, b) => a[0] - b[0] || a[1] - b[1])
    .map(([x, y]) => (y === 0 ? x : [x, y]));
}
