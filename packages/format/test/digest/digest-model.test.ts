import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalChunks } from '../../src/digest/canonical-chunks.js';
import { digestModel } from '../../src/digest/digest-model.js';
import { sha256Hex } from '../../src/digest/sha256.js';
import { canonicalJson } from '../../src/json/canonical-json.js';
import type { JsonValue } from '../../src/json/json-value.js';
import type { MatrixDocument } from '../../src/matrix/matrix-document.js';
import type { ModelDocument } from '../../src/model/model-document.js';
import { denseModel, resolveModel } from '../../src/model/resolve-model.js';
import { createNodeSha256 } from '../../src/node/node-sha256.js';
import { parseModel } from '../../src/schema/parse-document.js';
import { EVERY_FORM } from '../support/every-form.js';

const pauliX: ModelDocument = {
  schema: 'thalweg.model/1',
  algebra: [2],
  generator: { form: 'lindblad', jumps: [{ matrix: { pauli: 'X' } }] },
};

const withJump = (matrix: MatrixDocument): ModelDocument => ({
  ...pauliX,
  generator: { form: 'lindblad', jumps: [{ matrix }] },
});

const digest = (document: ModelDocument) => digestModel(resolveModel(document));

/** The digest by the standard's own words: canonical JSON of the dense document, hashed by node:crypto. */
function plainDigest(document: ModelDocument): string {
  const text = canonicalJson(denseModel(resolveModel(document)) as unknown as JsonValue);
  return createHash('sha256').update(text, 'utf8').digest('hex');
}

describe('sha256Hex', () => {
  it('gives the digests of FIPS 180-4', () => {
    expect(sha256Hex('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
    expect(sha256Hex(new Uint8Array())).toBe('e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855');
    expect(sha256Hex('abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq')).toBe(
      '248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1',
    );
  });
});

describe('digestModel', () => {
  it('is the SHA-256 of this text', () => {
    const text =
      '{"algebra":[2],"generator":{"form":"lindblad","jumps":[{"matrix":[[0,1],[1,0]]}]},"schema":"thalweg.model/1"}';
    expect([...canonicalChunks(resolveModel(pauliX))].join('')).toBe(text);
    expect(digest(pauliX)).toBe(sha256Hex(text));
    expect(digest(pauliX)).toBe('c2b3de3be3462dbfcc3e9cb2c76a366a7e13f83eeafb6795fd1513157d664e11');
  });

  it.each(Object.entries(EVERY_FORM))('of the form %s agrees with the plain path', (_form, document) => {
    expect(digest(document)).toBe(plainDigest(document));
    expect(digestModel(resolveModel(document), createNodeSha256)).toBe(digest(document));
    expect(digest(denseModel(resolveModel(document)))).toBe(digest(document));
  });

  it('does not depend on the form of a matrix', () => {
    const mtx = '%%MatrixMarket matrix coordinate integer symmetric\n2 2 1\n2 1 1\n';
    const readFile = () => new TextEncoder().encode(mtx);
    const others: MatrixDocument[] = [
      [
        [0, 1],
        [1, -0],
      ],
      {
        re: [
          [0, 1],
          [1, 0],
        ],
        im: [
          [0, -0],
          [0, 0],
        ],
      },
      {
        shape: [2, 2],
        entries: [
          [1, 0, 1, 0],
          [0, 1, 1, 0],
        ],
      },
      { pauli: { X: 1, Z: 0 } },
      { file: 'x.mtx' },
    ];
    for (const matrix of others) {
      expect(digestModel(resolveModel(withJump(matrix), { readFile }))).toBe(digest(pauliX));
    }
    expect(digest(withJump({ pauli: 'Y' }))).not.toBe(digest(pauliX));
  });

  it('does not depend on spacing or the order of fields, but on every value', () => {
    const text =
      ' {"generator" : {"jumps":[{"matrix":{"pauli":"X"}}],"form":"lindblad"}, "algebra":[ 2.0 ],\n"schema":"thalweg.model/1"}';
    expect(digest(parseModel(text))).toBe(digest(pauliX));
    expect(digest({ ...pauliX, title: 'X' })).not.toBe(digest(pauliX));
    const withRate: ModelDocument = {
      ...pauliX,
      generator: { form: 'lindblad', jumps: [{ rate: 1, matrix: { pauli: 'X' } }] },
    };
    expect(digest(withRate)).not.toBe(digest(pauliX));
  });

  it('writes any JSON as canonicalJson does', () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        expect([...canonicalChunks(value)].join('')).toBe(canonicalJson(value as JsonValue));
      }),
    );
  });

  it('writes numbers of matrices as canonicalJson does', () => {
    fc.assert(
      fc.property(fc.array(fc.double({ noNaN: true, noDefaultInfinity: true }), { minLength: 1 }), (row) => {
        const model = resolveModel(withJump([row]));
        expect([...canonicalChunks(model)].join('')).toContain(`"matrix":${canonicalJson([row])}`);
      }),
    );
  });

  it('hashes ten qubits without their dense text', () => {
    const model = resolveModel({ ...withJump({ pauli: 'XIIIIIIIIY' }), algebra: [1024] });
    const longest = Math.max(...Array.from(canonicalChunks(model), (chunk) => chunk.length));
    expect(longest).toBeLessThan(3000);
    expect(digestModel(model)).toBe(digestModel(model, createNodeSha256));
  });
});
