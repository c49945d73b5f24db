import './setup/node-version.mjs';
import { mkdirSync, readdirSync } from 'node:fs';
import { availableParallelism, loadavg } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { ensureBuilt, webRoot } from './setup/build.mjs';
import { ensureDebianPackages } from './setup/debian-packages.mjs';
import { ensureNpmPackages } from './setup/npm-packages.mjs';
import { findFreePort } from './setup/processes.mjs';
import { startApi } from './setup/programs.mjs';
import { createProgress, runScript } from './setup/progress.mjs';
import { tellWaiting } from './setup/set-up.mjs';
import { withSetupLock } from './setup/setup-lock.mjs';
import { startThrowAwayCluster } from './setup/throw-away-cluster.mjs';
import { SetupError, localDirectory, root } from './setup/workspace.mjs';

const progress = createProgress(process.stdout);
const sources = join(root, 'tests/bench');
const output = join(root, 'dist/bench');
/** What benches start beside themselves. */
const separateThreads = ['libs/workbook/src/read-worker.ts', 'tests/bench/page-server.ts'];

/** @typedef {import('../tests/bench/bench').BenchContext} BenchContext */
/** @typedef {import('../tests/bench/bench').BenchRow} BenchRow */

await runScript(
  async () => {
    const files = chooseFiles(process.argv.slice(2));
    await withSetupLock(() => prepare(files), tellWaiting(progress));
    const context = createContext(await startThrowAwayCluster(progress));
    for (const file of files) {
      progress.say(`\n── ${file}`);
      const bench = await import(pathToFileURL(join(output, file.replace(/\.ts$/, '.js'))).href);
      const before = loadText();
      printRows(await bench.default(context));
      progress.say(
        `Load of the machine: ${before} before, ${loadText()} after, ${availableParallelism()} cores`,
      );
    }
  },
  () => progress.say('\nStopping …'),
);

/** @returns {string} the average of the last minute; what else runs makes figures worse, ratios less so */
function loadText() {
  return (loadavg()[0] ?? 0).toFixed(1);
}

/** @param {string[]} patterns parts of file names; all benches when there are none */
function chooseFiles(patterns) {
  const files = readdirSync(sources).filter((file) => file.endsWith('.bench.ts'));
  const chosen = files.filter(
    (file) => patterns.length === 0 || patterns.some((part) => file.includes(part)),
  );
  if (chosen.length === 0) {
    throw new SetupError(`No bench matches. There are: ${files.join(', ') || 'none'}`, 2);
  }
  return chosen;
}

/** @param {string[]} files */
async function prepare(files) {
  await ensureDebianPackages(['postgresql', 'chromium'], progress);
  await ensureNpmPackages(progress);
  await ensureBuilt(['api', 'cli', 'demo-shop', 'web'], progress);
  await progress.step('Building the benches', () => bundle(files));
}

/** @param {string[]} files */
async function bundle(files) {
  const { build } = await import('esbuild');
  mkdirSync(output, { recursive: true });
  await build({
    absWorkingDir: root,
    entryPoints: [...files.map((file) => join(sources, file)), ...separateThreads],
    entryNames: '[name]',
    outdir: output,
    bundle: true,
    packages: 'external',
    platform: 'node',
    format: 'esm',
    target: 'node20',
    sourcemap: true,
    tsconfig: 'tsconfig.base.json',
    logLevel: 'error',
  });
}

/**
 * @param {import('./setup/throw-away-cluster.mjs').ThrowAwayCluster} cluster
 * @returns {BenchContext}
 */
function createContext(cluster) {
  return {
    makeDatabase: cluster.makeDatabase,
    webRoot,
    say: progress.say,
    async startApi(environment) {
      return startApi({
        environment,
        port: await findFreePort(4400),
        logFile: join(localDirectory, 'api-bench.log'),
        onError: progress.say,
      });
    },
  };
}

/**
 * @param {number} ratio
 * @param {BenchRow['aim']} aim
 * @returns {string[]} the aim, and whether it holds
 */
function judge(ratio, aim) {
  if (aim === null) {
    return ['', ''];
  }
  const holds = 'atLeast' in aim ? ratio >= aim.atLeast : ratio <= aim.atMost;
  return ['atLeast' in aim ? `≥ ${aim.atLeast}` : `≤ ${aim.atMost}`, holds ? 'holds' : 'MISSED'];
}

/** @param {BenchRow[]} rows */
function printRows(rows) {
  const cells = rows.map(({ measure, ratio, aim, detail }) => [
    measure,
    ratio.toFixed(2),
    ...judge(ratio, aim),
    detail,
  ]);
  const header = ['measure', 'ratio', 'aim', '', 'behind it'];
  const table = [header, ...cells];
  const widths = header.map((_, column) => Math.max(...table.map((row) => (row[column] ?? '').length)));
  table.forEach((row) =>
    progress.say(
      row
        .map((cell, column) => cell.padEnd(widths[column] ?? 0))
        .join('  ')
        .trimEnd(),
    ),
  );
}
