const { join, resolve } = require('node:path');
const { compilerOptions } = require('../../tsconfig.base.json');

const workspace = resolve(__dirname, '../..');
const aliases = Object.fromEntries(
  Object.entries(compilerOptions.paths).map(([name, [file]]) => [`^${name}$`, join(workspace, file)]),
);

/** Jest for the Node projects: TypeScript by swc, path aliases from tsconfig.base.json. */
module.exports = (rootDir, displayName) => ({
  rootDir,
  displayName,
  testEnvironment: 'node',
  testMatch: ['<rootDir>/**/*.spec.ts'],
  transform: {
    '^.+\\.[tj]s$': [
      '@swc/jest',
      {
        swcrc: false,
        jsc: { parser: { syntax: 'typescript', decorators: true }, target: 'es2022' },
        module: { type: 'commonjs' },
      },
    ],
  },
  transformIgnorePatterns: ['/node_modules/(?!(uuid)/)'],
  moduleNameMapper: aliases,
  modulePathIgnorePatterns: [join(workspace, 'dist')],
  // A database and a busy machine may take their time; what hangs is still found.
  testTimeout: 30_000,
  setupFiles: [join(workspace, 'tools/presets/jest.setup.cjs')],
});
