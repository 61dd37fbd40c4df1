/** Import directions: core <- format <- command line. An app never imports another app. */
export default {
  forbidden: [
    {
      name: 'core-imports-only-itself-and-ml-matrix',
      severity: 'error',
      comment: 'The numerics run anywhere: no Node.js module, no other package.',
      from: { path: '^packages/core/src' },
      to: { pathNot: ['^packages/core/src', '^node_modules/ml-matrix/'] },
    },
    {
      name: 'format-imports-only-core',
      severity: 'error',
      from: { path: '^packages/format/src' },
      to: { path: ['^packages/', '^apps/', '^tests/'], pathNot: ['^packages/(core|format)/src', '/node_modules/'] },
    },
    {
      name: 'pictures-import-only-core',
      severity: 'error',
      comment: 'Data to SVG text, in Node.js and in a browser alike.',
      from: { path: '^packages/pictures/src' },
      to: { path: ['^packages/', '^apps/', '^tests/'], pathNot: ['^packages/(core|pictures)/src'] },
    },
    {
      name: 'sandbox-imports-only-core',
      severity: 'error',
      comment: 'Nothing of the program is near an untrusted generator.',
      from: { path: '^packages/sandbox/src' },
      to: { path: ['^packages/', '^apps/', '^tests/'], pathNot: ['^packages/(core|sandbox)/src'] },
    },
    {
      name: 'apps-never-import-each-other',
      severity: 'error',
      from: { path: '^apps/([^/]+)/' },
      to: { path: '^apps/', pathNot: '^apps/$1/' },
    },
    {
      name: 'packages-never-import-apps',
      severity: 'error',
      from: { path: '^packages/' },
      to: { path: '^(apps|tests)/' },
    },
    {
      name: 'other-packages-through-their-index',
      severity: 'error',
      comment:
        'What a package offers is what its manifest exports: src/index.ts, src/node or src/browser/index.ts for one of them only, and src/api/index.ts for what goes over the network.',
      from: { path: '^(packages|apps)/([^/]+)/' },
      to: {
        path: '^packages/[^/]+/src/',
        pathNot: ['^packages/[^/]+/src/((node|browser|api)/)?index\\.ts$', '^$1/$2/'],
      },
    },
    {
      name: 'no-cycles',
      severity: 'error',
      from: { path: '^(packages|apps)/[^/]+/src' },
      to: { circular: true, viaOnly: { dependencyTypesNot: ['type-only'] } },
    },
    {
      name: 'checker-stands-alone',
      severity: 'error',
      comment:
        'What proves a result shares no code with what found it: matrix storage, the algebra and the model itself only.',
      from: { path: '^packages/core/src/checker/' },
      to: {
        path: '^(packages/core/src|node_modules)/',
        pathNot: [
          '^packages/core/src/checker/',
          '^packages/core/src/errors\\.ts$',
          '^packages/core/src/linalg/(complex|sparse)-matrix\\.ts$',
          '^packages/core/src/algebra/block-algebra\\.ts$',
          '^packages/core/src/generator/(generator|apply-generator)\\.ts$',
        ],
      },
    },
    { name: 'everything-resolves', severity: 'error', from: {}, to: { couldNotResolve: true } },
    {
      name: 'sources-do-not-import-tests',
      severity: 'error',
      from: { path: '/src/' },
      to: { path: '(/test/|\\.test\\.ts$)' },
    },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '(^|/)(dist|coverage)/' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.base.json' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['source', 'import', 'require', 'node', 'default', 'types'],
      extensions: ['.ts', '.tsx', '.js', '.mjs', '.json'],
    },
  },
};
