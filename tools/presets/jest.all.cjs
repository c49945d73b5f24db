const { existsSync, readdirSync } = require('node:fs');
const { join, resolve } = require('node:path');
const nodeProject = require('./jest.node.cjs');

const workspace = resolve(__dirname, '../..');
const foldersOf = (folder) => readdirSync(join(workspace, folder)).map((name) => `${folder}/${name}`);

/** All projects with a Jest configuration, so that one Jest process runs every spec. */
module.exports = {
  rootDir: workspace,
  // With several projects Jest heeds the time limit of this file alone.
  testTimeout: nodeProject(workspace, 'all').testTimeout,
  projects: [...foldersOf('apps'), ...foldersOf('libs'), 'migrations', 'tests', 'tools/demo-shop']
    .map((folder) => join(workspace, folder, 'jest.config.cjs'))
    .filter((file) => existsSync(file)),
};
