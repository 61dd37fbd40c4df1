import { ThalwegError } from '@thalweg/core';
import { describeValue } from '../describe-value.js';

/** The first line of a Matrix Market file (Boisvert, Pozo & Remington, NISTIR 5935, 1996). */
export interface MtxBanner {
  readonly format: (typeof FORMATS)[number];
  readonly field: (typeof FIELDS)[number];
  readonly symmetry: (typeof SYMMETRIES)[number];
}

const FORMATS = ['coordinate', 'array'] as const;
const FIELDS = ['real', 'complex', 'integer', 'pattern'] as const;
const SYMMETRIES = ['general', 'symmetric', 'hermitian', 'skew-symmetric'] as const;

/** Reads the banner line; throws `bad-file` or, for a combination the format forbids, `not-supported`. */
export function readBanner(line: string): MtxBanner {
  const [magic, object, ...words] = line.trim().split(/\s+/);
  if (magic?.toLowerCase() !== '%%matrixmarket') {
    throw new ThalwegError(
      'bad-file',
      `expected a Matrix Market file (it starts with %%MatrixMarket), got ${describeValue(line.trim())}; write it with scipy.io.mmwrite`,
    );
  }
  if (object?.toLowerCase() !== 'matrix') {
    throw new ThalwegError(
      'not-supported',
      `expected a Matrix Market "matrix", got ${describeValue(object)}; write the matrix with scipy.io.mmwrite`,
    );
  }
  if (words.length !== 3) {
    throw new ThalwegError(
      'bad-file',
      `expected three words for format, field and symmetry after "matrix", got ${words.length}; write for example %%MatrixMarket matrix coordinate complex general`,
    );
  }
  const banner = {
    format: oneOf(FORMATS, words[0], 'format'),
    field: oneOf(FIELDS, words[1], 'field'),
    symmetry: oneOf(SYMMETRIES, words[2], 'symmetry'),
  };
  requireMeaning(banner);
  return banner;
}

function oneOf<T extends string>(choices: readonly T[], word: string | undefined, what: string): T {
  const found = choices.find((choice) => choice === word?.toLowerCase());
  if (found !== undefined) return found;
  throw new ThalwegError(
    'bad-file',
    `expected a Matrix Market ${what} ${choices.join(', ')}, got ${describeValue(word)}; correct the first line`,
  );
}

function requireMeaning({ format, field, symmetry }: MtxBanner): void {
  const impossible =
    (field === 'pattern' && (format === 'array' || symmetry === 'skew-symmetric' || symmetry === 'hermitian')) ||
    (symmetry === 'hermitian' && field !== 'complex');
  if (!impossible) return;
  throw new ThalwegError(
    'not-supported',
    `expected a combination that Matrix Market defines, got ${format} ${field} ${symmetry}; hermitian goes with complex, pattern with coordinate general or symmetric`,
  );
}
