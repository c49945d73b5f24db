const nodeProject = require('../../tools/presets/jest.node.cjs');

/** The browser journeys: one after the other, against the built API that the global set-up starts. */
module.exports = {
  ...nodeProject(__dirname, 'e2e'),
  testMatch: ['<rootDir>/**/*.e2e.ts'],
  globalSetup: '<rootDir>/serve-built-app.cjs',
  globalTeardown: '<rootDir>/stop-built-app.cjs',
  // A journey takes seconds; where many suites share the machine, minutes.
  testTimeout: 240_000,
  maxWorkers: 1,
};
