import * as z from 'zod';
import { CONVENTION_NAMES } from '@thalweg/core';
import { readDuration, readName, readSetting, readWholeNumber } from './option-values.js';
import { textOption } from './parse-options.js';
import type { Machine } from './verb.js';

const DEFAULT_SEED = 1;
const DEFAULT_CONVENTION = 'two-alpha';
const MOST_THREADS = 256;

/** The options of every verb that computes, with their defaults. */
export function globalOptions(machine: Machine) {
  return {
    json: z.boolean().default(false),
    quiet: z.boolean().default(false),
    color: z.boolean().default(true),
    seed: textOption((text) => readWholeNumber('--seed', text, 0, Number.MAX_SAFE_INTEGER)).default(DEFAULT_SEED),
    threads: textOption((text) => readWholeNumber('--threads', text, 1, MOST_THREADS)).default(machine.processors),
    /** Milliseconds; null for no limit. */
    timeLimit: textOption((text) => readDuration('--time-limit', text))
      .nullable()
      .default(null),
    convention: textOption((text) => readName('--convention', text, CONVENTION_NAMES)).default(DEFAULT_CONVENTION),
  };
}

/** A file to write; null where not given. */
export function fileOption() {
  return z.string().nullable().default(null);
}

/** The options of every verb that takes a model, or an example with values for its parameters. */
export function modelOptions() {
  return {
    model: z.string(),
    set: z.array(textOption((text) => readSetting('--set', text))).default([]),
  };
}

/** The options of every verb that speaks to a registry. */
export function registryOptions() {
  return { registry: z.string().nullable().default(null) };
}
