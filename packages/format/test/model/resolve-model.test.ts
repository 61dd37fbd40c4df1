import { describe, expect, it } from 'vitest';
import type { MatrixDocument } from '../../src/matrix/matrix-document.js';
import { mapMatrices } from '../../src/model/map-matrices.js';
import type { ModelDocument } from '../../src/model/model-document.js';
import { denseModel, resolveModel } from '../../src/model/resolve-model.js';
import { valueAt } from '../../src/json/value-at.js';
import { matrixSchema } from '../../src/schema/matrix-schema.js';
import { checkModel } from '../../src/schema/parse-document.js';
import { refusal } from '../support/caught-error.js';
import { EVERY_FORM } from '../support/every-form.js';

/** A path from a JSON pointer without escapes. */
const pathOf = (pointer: string) => pointer.split('/').slice(1);

describe('mapMatrices', () => {
  it.each(Object.entries(EVERY_FORM))('finds every matrix of the form %s at its pointer', (_form, document) => {
    const pointers: string[] = [];
    const same = mapMatrices(document, (matrix: MatrixDocument, pointer) => {
      pointers.push(pointer);
      expect(valueAt(document, pathOf(pointer))).toBe(matrix);
      return matrix;
    });
    expect(same).toStrictEqual(document);
    const objects = matrixObjects(document);
    expect(pointers.filter((pointer) => objects.includes(pointer)).sort()).toEqual(objects.sort());
  });
});

/** Pointers of everything in the document that can only be a matrix: objects that the matrix schema takes. */
function matrixObjects(value: unknown, path = ''): string[] {
  if (typeof value !== 'object' || value === null) return [];
  if (!Array.isArray(value) && matrixSchema.safeParse(value).success) return [path];
  return Object.entries(value).flatMap(([key, field]) => matrixObjects(field, `${path}/${key}`));
}

describe('resolveModel', () => {
  const files: ModelDocument = {
    schema: 'thalweg.model/1',
    algebra: [1],
    state: { file: 's.mtx' },
    generator: {
      form: 'sum',
      terms: [{ weight: 1, generator: { form: 'lindblad', jumps: [{ matrix: { file: 'jumps/r.mtx' } }] } }],
    },
  };
  const readFile = (path: string) =>
    new TextEncoder().encode(`%%MatrixMarket matrix array real general\n1 1\n${path.length}\n`);

  it('reads the files that the document names', () => {
    expect(denseModel(resolveModel(files, { readFile }))).toStrictEqual({
      ...files,
      state: [[5]],
      generator: { form: 'sum', terms: [{ weight: 1, generator: { form: 'lindblad', jumps: [{ matrix: [[11]] }] } }] },
    });
  });

  it('points at the matrix that fails', () => {
    expect(refusal(() => resolveModel(files))).toEqual([
      'not-supported',
      '/generator/terms/0/generator/jumps/0/matrix/file',
      'expected matrices inside the document, got the file the text "jumps/r.mtx"; write the matrix out or use a document in a folder',
    ]);
  });

  it('gives dense documents that the schema accepts', () => {
    for (const document of Object.values(EVERY_FORM)) {
      const dense = denseModel(resolveModel(document));
      expect(checkModel(dense)).toStrictEqual(dense);
    }
  });

  it('bounds all matrices together', () => {
    const limits = { side: 4, denseEntries: 4, sparseEntries: 4 };
    const jumps = Array.from({ length: 9 }, () => ({
      matrix: [
        [1, 2],
        [3, 4],
      ],
    }));
    const document = { schema: 'thalweg.model/1', algebra: [2], generator: { form: 'lindblad', jumps } } as const;
    expect(refusal(() => resolveModel(checkModel(document), { limits }))).toEqual([
      'too-large',
      '/generator/jumps/8/matrix',
      'expected at most 32 stored matrix entries in a model, got more; reduce the model',
    ]);
  });
});
