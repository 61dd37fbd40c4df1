import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { completePoint, readExample, type ExamplePackage, type ParameterPoint } from '@thalweg/format';
import { filesOfFolder } from '@thalweg/format/node';

const folder = fileURLToPath(new URL('../../../examples/', import.meta.url));

/** The folder of a bundled example. */
export function folderOf(name: string): string {
  return join(folder, name);
}

/** Names of all bundled examples, sorted. */
export function bundledExamples(): string[] {
  return readdirSync(folder)
    .filter((name) => existsSync(join(folder, name, 'example.json')))
    .sort();
}

/** Files of tests that share the examples. */
const SHARES = 6;

/** The examples of one file, numbered from 1. */
export function shareOf(file: number): string[] {
  return bundledExamples().filter((_, k) => k % SHARES === file - 1);
}

export function readBundled(name: string): ExamplePackage {
  return readExample(filesOfFolder(folderOf(name)));
}

/** The points of the showcase with defaults filled in. */
export function showcaseOf({ document: { parameters, showcase } }: ExamplePackage): ParameterPoint[] {
  return showcase.map((values) => completePoint(parameters, values));
}
