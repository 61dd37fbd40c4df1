import { join } from 'node:path';
import ts from 'typescript';
import { expect, test } from 'vitest';
import { listCode, readText, root } from './helpers/repository.js';

const PACKAGES = ['core', 'format', 'sandbox'];

/** Names that a package's index exports, types included, as TypeScript resolves them. */
function exportedNames(name: string): string[] {
  const index = join(root, `packages/${name}/src/index.ts`);
  const program = ts.createProgram([index], {
    noEmit: true,
    skipLibCheck: true,
    target: ts.ScriptTarget.ES2022,
    module: ts.ModuleKind.NodeNext,
    moduleResolution: ts.ModuleResolutionKind.NodeNext,
    types: [],
  });
  const checker = program.getTypeChecker();
  const source = program.getSourceFile(index);
  const symbol = source && checker.getSymbolAtLocation(source);
  if (symbol === undefined) throw new Error(`expected ${index} to be a module`);
  return checker
    .getExportsOfModule(symbol)
    .map((exported) => exported.getName())
    .sort();
}

test.each(PACKAGES)('names that %s offers', (name) => {
  expect(exportedNames(name)).toMatchSnapshot();
});

test('an index re-exports and does nothing else', () => {
  const indices = listCode().filter((path) => /^(packages|apps)\/.*\/src\/(.*\/)?index\.tsx?$/.test(path));
  expect(indices).toEqual(expect.arrayContaining(PACKAGES.map((name) => `packages/${name}/src/index.ts`)));
  for (const path of indices) {
    const source = ts.createSourceFile(path, readText(path), ts.ScriptTarget.ES2022);
    const others = source.statements.filter(
      (node) => !ts.isExportDeclaration(node) || node.moduleSpecifier === undefined,
    );
    expect(
      others.map((node) => node.getText(source)),
      path,
    ).toEqual([]);
  }
});
