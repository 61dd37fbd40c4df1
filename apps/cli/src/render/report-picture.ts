import { ThalwegError } from '@thalweg/core';
import type { ReportDocument } from '@thalweg/format';
import { spectrum } from '@thalweg/pictures';
import { UNTITLED } from './model-line.js';

/** The spectrum of a report as an SVG picture. Throws `too-large` where the report has none. */
export function reportPicture({ model, spectrum: eigenvalues }: ReportDocument): string {
  if (eigenvalues !== null) return spectrum({ title: model.title ?? UNTITLED, eigenvalues });
  throw new ThalwegError(
    'too-large',
    `expected a model whose spectrum is computed, got algebra dimension ${model.dimension}; leave --svg out`,
  );
}
