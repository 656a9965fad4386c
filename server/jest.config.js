/** @type {import('jest').Config} */
module.exports = {
  rootDir: '.',
  roots: ['<rootDir>/src', '<rootDir>/test'],
  testRegex: '\\.(e2e-)?spec\\.ts$',
  testEnvironment: '<rootDir>/test/quick-environment.js',
  testEnvironmentOptions: { customExportConditions: ['pegwell-source', 'node', 'node-addons'] },
  transform: {
    '^.+\\.(t|j)s$': [
      '@swc/jest',
      {
        jsc: {
          parser: { syntax: 'typescript', decorators: true },
          transform: { legacyDecorator: true, decoratorMetadata: true },
          target: 'es2023',
        },
        module: { type: 'commonjs' },
      },
    ],
  },
  maxWorkers: 2,
  testTimeout: 120_000,
};
