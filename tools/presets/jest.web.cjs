const { join, resolve } = require('node:path');
const { compilerOptions } = require('../../tsconfig.base.json');

const workspace = resolve(__dirname, '../..');
const aliases = Object.fromEntries(
  Object.entries(compilerOptions.paths).map(([name, [file]]) => [`^${name}$`, join(workspace, file)]),
);

/** Jest for the Angular projects: jest-preset-angular, zoneless, jsdom. */
module.exports = (rootDir, displayName) => ({
  rootDir,
  displayName,
  preset: 'jest-preset-angular',
  testEnvironment: 'jsdom',
  // Drawing Material in jsdom takes seconds on a busy machine.
  testTimeout: 30_000,
  testMatch: ['<rootDir>/**/*.spec.ts'],
  setupFilesAfterEnv: [join(workspace, 'tools/presets/jest.web-setup.cjs')],
  transform: {
    '^.+\\.(ts|mjs|js|html)$': [
      'jest-preset-angular',
      {
        tsconfig: join(workspace, 'tools/presets/tsconfig.web-spec.json'),
        stringifyContentPathRegex: '\\.(html|svg)$',
      },
    ],
  },
  transformIgnorePatterns: [
    'node_modules/(?!.*\\.mjs$|@internationalized|uuid|echarts|zrender|ngx-echarts|ag-grid)',
  ],
  moduleNameMapper: aliases,
  modulePathIgnorePatterns: [join(workspace, 'dist')],
});
