import { existsSync, readdirSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { failingParts, nxEnvironment, nxProgram } from './build.mjs';
import { run } from './processes.mjs';
import { root } from './workspace.mjs';

/** @typedef {{ code: number, output: string }} CheckResult */

/** Checks that need neither a build nor a database. */
export const staticChecks = [
  { title: 'Format (prettier)', run: checkFormat },
  { title: 'Lint', run: checkLint },
  { title: 'Types', run: checkTypes },
  { title: 'Circular imports', run: checkCircularImports },
];

function checkFormat() {
  return runModule('prettier/bin/prettier.cjs', ['--check', '--log-level=warn', '.']);
}

async function checkLint() {
  const args = ['run-many', '-t', 'lint', '--parallel=2', '--outputStyle=static'];
  const env = { ...nxEnvironment(), FORCE_COLOR: '0' };
  const { code, output } = await run(process.execPath, [nxProgram, ...args], { env });
  return { code, output: failingParts(output) };
}

/** TypeScript for each Node project and the scripts, Angular's own compiler for the web projects. */
async function checkTypes() {
  const web = ['apps/web', 'libs/ui'];
  const node = [
    ...foldersOf('apps'),
    ...foldersOf('libs'),
    'migrations',
    'tests',
    'tools',
    'tools/demo-shop',
  ];
  const checks = [
    ...web.map(
      (project) => () =>
        runModule('@angular/compiler-cli/bundles/src/bin/ngc.js', ['--noEmit', '-p', project]),
    ),
    ...node
      .filter((project) => !web.includes(project) && existsSync(join(root, project, 'tsconfig.json')))
      .map((project) => () => runModule('typescript/bin/tsc', ['--noEmit', '-p', project])),
  ];
  return combine(await runSeveral(checks, availableParallelism()));
}

function checkCircularImports() {
  return run(process.execPath, [join(root, 'tools/setup/find-circular-imports.mjs')]);
}

/** @param {string} folder */
function foldersOf(folder) {
  return readdirSync(join(root, folder)).map((name) => `${folder}/${name}`);
}

/**
 * @param {string} program path below node_modules
 * @param {string[]} args
 */
function runModule(program, args) {
  return run(process.execPath, [join(root, 'node_modules', program), ...args]);
}

/**
 * @param {(() => Promise<CheckResult>)[]} checks
 * @param {number} atOnce
 */
async function runSeveral(checks, atOnce) {
  /** @type {CheckResult[]} */
  const results = [];
  const waiting = [...checks];
  const worker = async () => {
    for (let check = waiting.shift(); check; check = waiting.shift()) {
      results.push(await check());
    }
  };
  await Promise.all(Array.from({ length: atOnce }, worker));
  return results;
}

/** @param {CheckResult[]} results */
function combine(results) {
  const failures = results.filter(({ code }) => code !== 0);
  return { code: failures.length, output: failures.map(({ output }) => output).join('\n') };
}
