import './setup/node-version.mjs';
import { mkdirSync, readdirSync } from 'node:fs';
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
      printRows(await bench.default(context));
    }
  },
  () => progress.say('\nStopping …'),
);

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
    entryPoints: [...files.map((file) => join(sources, file)), 'libs/workbook/src/read-worker.ts'],
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

/** @param {BenchRow[]} rows */
function printRows(rows) {
  const cells = rows.map(({ measure, ratio, aim, detail }) => {
    const holds = 'atLeast' in aim ? ratio >= aim.atLeast : ratio <= aim.atMost;
    const wanted = 'atLeast' in aim ? `≥ ${aim.atLeast}` : `≤ ${aim.atMost}`;
    return [measure, ratio.toFixed(2), wanted, holds ? 'holds' : 'MISSED', detail];
  });
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
