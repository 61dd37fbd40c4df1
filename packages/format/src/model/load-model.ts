import type { Generator } from '@thalweg/core';
import { digestModel } from '../digest/digest-model.js';
import { createSha256, type RunningHash } from '../digest/sha256.js';
import { checkModel, parseModel, type Source } from '../schema/parse-document.js';
import { buildGenerator } from './build-generator.js';
import type { ModelDocument } from './model-document.js';
import { resolveModel, type ResolvedModel, type ResolveOptions } from './resolve-model.js';

/** A model in every stage from its document to the generator. */
export interface LoadedModel {
  readonly document: ModelDocument;
  readonly resolved: ResolvedModel;
  readonly digest: string;
  readonly generator: Generator;
}

export interface LoadOptions extends ResolveOptions {
  /** The SHA-256 to use; a plain one when left out. */
  readonly createHash?: () => RunningHash;
}

/** Reads a model from text, UTF-8 bytes or a value that is already parsed, decodes its matrices, and builds its generator. */
export function loadModel(source: Source | object, options: LoadOptions = {}): LoadedModel {
  const isText = typeof source === 'string' || source instanceof Uint8Array;
  const document = isText ? parseModel(source) : checkModel(source);
  const resolved = resolveModel(document, options);
  const generator = buildGenerator(resolved);
  return { document, resolved, digest: digestModel(resolved, options.createHash ?? createSha256), generator };
}
