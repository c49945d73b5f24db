import { createRequire } from 'node:module';
import { join } from 'node:path';
import { root } from './workspace.mjs';

// madge comes without types.
const madge = createRequire(import.meta.url)('madge');
const folders = ['apps', 'libs', 'migrations', 'tests', 'tools/demo-shop'];
const graph = await madge(
  folders.map((folder) => join(root, folder)),
  {
    baseDir: root,
    fileExtensions: ['ts'],
    tsConfig: join(root, 'tsconfig.base.json'),
    excludeRegExp: [/(^|\/)(node_modules|dist)\//],
  },
);
const files = Object.keys(graph.obj());
const circles = graph.circular();

if (files.length === 0) {
  process.stderr.write('No source was found to look at.\n');
  process.exitCode = 1;
}
for (const circle of circles) {
  process.stderr.write(`${[...circle, circle[0]].join(' → ')}\n`);
  process.exitCode = 1;
}
