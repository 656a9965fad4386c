const js = require('@eslint/js');
const { defineConfig } = require('eslint/config');
const reactHooks = require('eslint-plugin-react-hooks');
const globals = require('globals');
const tseslint = require('typescript-eslint');

// Layout is prettier's, imports are dependency-cruiser's; here is what the types alone do not say.
module.exports = defineConfig(
  { ignores: ['**/dist/', '**/.cache/', '.data/', 'pictures/', 'server/src/database/migrations/'] },
  js.configs.recommended,
  {
    files: ['**/*.{ts,tsx,mts}'],
    extends: [tseslint.configs.strictTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: __dirname } },
    rules: {
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'inline-type-imports' }],
      // A Nest module is a class with nothing in it.
      '@typescript-eslint/no-extraneous-class': [
        'error',
        { allowEmpty: true, allowWithDecorator: true, allowStaticOnly: false },
      ],
      // Numbers in sentences are fine; objects and undefined are not.
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/no-unused-vars': ['error', { argsIgnorePattern: '^_', varsIgnorePattern: '^_' }],
      // `() => save()` and `return response.end()` read well.
      '@typescript-eslint/no-confusing-void-expression': 'off',
      // `[...text]` is how to go by code points, which is meant where it is written.
      '@typescript-eslint/no-misused-spread': 'off',
      // An interface may promise what one of its implementations knows at once.
      '@typescript-eslint/require-await': 'off',
      '@typescript-eslint/no-unnecessary-type-arguments': 'off',
      '@typescript-eslint/no-unsafe-class-instance-assignment': 'off',
      '@typescript-eslint/no-misused-promises': ['error', { checksVoidReturn: { attributes: false } }],
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true },
      ],
      // No barrels inside a workspace: an import says where a thing lives.
      'no-restricted-syntax': [
        'error',
        { selector: 'ExportAllDeclaration', message: 'No barrels: export by name where it lives.' },
      ],
      eqeqeq: 'error',
      'no-console': 'error',
    },
  },
  {
    // Nest finds what to inject by the classes of constructor parameters, which must be imported as values.
    files: ['server/**/*.ts'],
    rules: { '@typescript-eslint/consistent-type-imports': 'off' },
  },
  {
    files: ['client/**/*.{ts,tsx}'],
    extends: [reactHooks.configs.flat['recommended-latest']],
  },
  {
    // Pure: the same input gives the same answer, so no clock, no chance, nothing read from outside.
    files: ['shared/src/{music,session}/**/*.ts', 'server/src/ordering/engine/**/*.ts'],
    ignores: ['**/*.spec.ts'],
    rules: {
      'no-restricted-globals': [
        'error',
        'Date',
        'performance',
        'process',
        'fetch',
        'setTimeout',
        'setInterval',
        'crypto',
      ],
      'no-restricted-properties': [
        'error',
        { object: 'Math', property: 'random', message: 'Chance is handed in, from a seed.' },
      ],
    },
  },
  {
    // Loops over dense arrays, bounded by their lengths: `!` there is what the index already says.
    files: ['shared/src/{music,session}/**/*.ts', 'server/src/ordering/**/*.ts', 'bench/**/*.ts'],
    rules: { '@typescript-eslint/no-non-null-assertion': 'off' },
  },
  {
    files: ['**/*.{spec,e2e-spec,e2e}.{ts,tsx}', 'server/test/**', 'e2e/**'],
    rules: {
      // A test says what it expects to be there; when it is not, it fails, which is its work.
      '@typescript-eslint/no-non-null-assertion': 'off',
      // Matchers such as expect.objectContaining are typed `any` by the runners.
      '@typescript-eslint/no-unsafe-assignment': 'off',
    },
  },
  {
    // A measurement is for the terminal.
    files: ['bench/**/*.ts'],
    rules: { 'no-console': 'off' },
  },
  {
    files: ['**/*.{js,cjs}'],
    ignores: ['client/**'],
    languageOptions: { sourceType: 'commonjs', globals: globals.node },
  },
  {
    files: ['client/public/**/*.js'],
    languageOptions: { sourceType: 'script', globals: globals.browser },
  },
);
