// Who may import whom. The folders say what a file knows; these rules keep it so.
// A spec may reach for what it needs to judge, hence the exception in the rules of purity.
/** Mounts whole routes for route-level tests. */
const TEST_HELP = '^client/src/lib/test-';
const NOT_SPEC = '\\.(e2e-)?spec\\.tsx?$';

/** @type {import('dependency-cruiser').IConfiguration} */
module.exports = {
  forbidden: [
    {
      name: 'no-cycles',
      comment: 'Files that need each other are one file, or hide a third.',
      severity: 'error',
      from: {},
      to: { circular: true },
    },
    {
      name: 'nothing-unresolvable',
      severity: 'error',
      from: {},
      to: { couldNotResolve: true },
    },
    {
      name: 'no-undeclared-packages',
      comment: 'A package is named in the package.json of the workspace that uses it.',
      severity: 'error',
      from: {},
      to: { dependencyTypes: ['npm-no-pkg', 'npm-unknown'] },
    },
    {
      name: 'music-is-pure',
      comment: 'No clock, no chance, no I/O: music knows music, and tonal.',
      severity: 'error',
      from: { path: '^shared/src/music/', pathNot: NOT_SPEC },
      to: { pathNot: ['^shared/src/music/', 'node_modules/(tonal|@tonaljs)/'] },
    },
    {
      name: 'session-rules-are-pure',
      comment: 'They may name the shapes that cross the wire (types alone), and check nothing of them.',
      severity: 'error',
      from: { path: '^shared/src/session/', pathNot: NOT_SPEC },
      to: { pathNot: ['^shared/src/(session|music)/'], dependencyTypesNot: ['type-only'] },
    },
    {
      name: 'engine-is-pure',
      comment: 'The ordering engine is handed everything it needs.',
      severity: 'error',
      from: { path: '^server/src/ordering/engine/', pathNot: NOT_SPEC },
      to: { pathNot: ['^server/src/ordering/engine/', '^shared/src/(music|session)/'] },
    },
    {
      name: 'contract-is-only-the-wire',
      comment: 'zod, and the names of music and sessions that it speaks of.',
      severity: 'error',
      from: { path: '^shared/src/contract/', pathNot: NOT_SPEC },
      to: { pathNot: ['^shared/src/(contract|music|session)/', 'node_modules/zod/'] },
    },
    {
      name: 'shared-knows-no-side',
      severity: 'error',
      from: { path: '^shared/' },
      to: { path: '^(server|client|scripts|e2e|bench)/' },
    },
    {
      name: 'server-and-client-meet-in-shared',
      severity: 'error',
      from: { path: '^server/' },
      to: { path: '^client/' },
    },
    {
      name: 'client-and-server-meet-in-shared',
      severity: 'error',
      from: { path: '^client/' },
      to: { path: '^server/' },
    },
    {
      name: 'a-feature-asks-the-service',
      comment: "Another feature's repository is its own business.",
      severity: 'error',
      from: { path: '^server/src/([^/]+)/' },
      to: { path: '^server/src/.*\\.repository\\.ts$', pathNot: '^server/src/$1/' },
    },
    {
      name: 'tables-at-home',
      comment:
        "Another feature's table is imported only by tables, for foreign keys, by the schema as a whole, and by the demo, which writes a past.",
      severity: 'error',
      from: {
        path: '^server/src/([^/]+)/',
        pathNot: [
          '\\.table\\.ts$',
          '^server/src/database/',
          '^server/src/demo/demo\\.repository\\.ts$',
          NOT_SPEC,
        ],
      },
      to: { path: '^server/src/.*\\.table\\.ts$', pathNot: ['^server/src/$1/', '^server/src/common/'] },
    },
    {
      name: 'nobody-imports-live',
      comment:
        'What a phone can see is announced through common; live listens. The demo writes a past into its tables.',
      severity: 'error',
      from: {
        path: '^server/src/',
        pathNot: [
          '^server/src/live/',
          '^server/src/app\\.module\\.ts$',
          '^server/src/demo/demo\\.repository\\.ts$',
        ],
      },
      to: { path: '^server/src/live/' },
    },
    {
      name: 'server-does-not-know-its-tests',
      severity: 'error',
      from: { path: '^server/src/', pathNot: NOT_SPEC },
      to: { path: '^server/test/' },
    },
    {
      name: 'features-do-not-know-each-other',
      comment: 'Routes compose them.',
      severity: 'error',
      from: { path: '^client/src/features/([^/]+)/' },
      to: { path: '^client/src/features/', pathNot: '^client/src/features/$1/' },
    },
    {
      name: 'features-do-not-know-routes',
      severity: 'error',
      from: { path: '^client/src/(features|ui|lib|theme)/', pathNot: [NOT_SPEC, TEST_HELP] },
      to: { path: '^client/src/(routes/|router)' },
    },
    {
      name: 'ui-has-no-product-words',
      severity: 'error',
      from: { path: '^client/src/(ui|lib|theme)/', pathNot: [NOT_SPEC, TEST_HELP] },
      to: { path: '^client/src/features/' },
    },
  ],
  options: {
    doNotFollow: { path: 'node_modules' },
    exclude: { path: '(^|/)dist/' },
    tsPreCompilationDeps: true,
    combinedDependencies: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['pegwell-source', 'import', 'require', 'node', 'default', 'types'],
      mainFields: ['main', 'types'],
      extensions: ['.ts', '.tsx', '.mts', '.js', '.cjs', '.mjs', '.json', '.d.ts'],
    },
  },
};
