import './setup/node-version.mjs';
import { join } from 'node:path';
import { parseArgs } from 'node:util';
import { ensureBuilt } from './setup/build.mjs';
import { ensureDebianPackages } from './setup/debian-packages.mjs';
import { runJest, specKinds } from './setup/jest-suite.mjs';
import { ensureNpmPackages } from './setup/npm-packages.mjs';
import { seedDemoShop } from './setup/programs.mjs';
import { createProgress, runScript } from './setup/progress.mjs';
import { tellWaiting } from './setup/set-up.mjs';
import { runScriptTests } from './setup/script-suite.mjs';
import { withSetupLock } from './setup/setup-lock.mjs';
import { staticChecks } from './setup/static-checks.mjs';
import { Tally, asOneCheck } from './setup/tally.mjs';
import { startThrowAwayCluster } from './setup/throw-away-cluster.mjs';
import { SetupError, errorText, root } from './setup/workspace.mjs';

const usage = `Usage: npm test [-- --only unit|db|api|e2e|lint] [PATH PATTERN ...]

  Without options, everything: format, lint, types, circular imports, builds, the specs of all projects in two
  time zones, and the browser journeys. With path patterns, the specs whose path matches.`;

const progress = createProgress(process.stdout);
const tally = new Tally(progress);
const { only, patterns } = readArguments();

/** @typedef {import('./setup/throw-away-cluster.mjs').ThrowAwayCluster} ThrowAwayCluster */
/** @typedef {import('./setup/jest-suite.mjs').JestOptions} JestOptions */

await runScript(
  async () => {
    try {
      await runAll();
    } catch (error) {
      tally.abort(error);
    }
    return tally.failed > 0 ? 1 : 0;
  },
  () => progress.say('\nStopping …'),
  () => progress.say(`\n${tally.summary()}`),
);

async function runAll() {
  await withSetupLock(prepare, tellWaiting(progress));
  await runStaticChecks();
  if (only === undefined || only === 'unit') {
    await tally.run('Scripts', runScriptTests);
  }
  await runBuilds();
  if (only !== 'lint') {
    await runSpecs(await startThrowAwayCluster(progress));
  }
}

async function prepare() {
  await ensureDebianPackages(['postgresql', 'chromium', 'libreoffice-calc'], progress);
  await ensureNpmPackages(progress);
}

async function runStaticChecks() {
  if (only === undefined || only === 'lint') {
    for (const check of staticChecks) {
      await tally.run(check.title, asOneCheck(check.run));
    }
  }
}

/** The specs and journeys need the built programs, so these are built in every case but lint alone. */
async function runBuilds() {
  if (only === 'lint') {
    return;
  }
  for (const program of /** @type {const} */ (['cli', 'api', 'demo-shop', 'web'])) {
    const build = async () => {
      await withSetupLock(() => ensureBuilt([program], progress), tellWaiting(progress));
      return { code: 0, output: '' };
    };
    await tally.run(`Build of ${program}`, asOneCheck(build));
  }
}

/** @param {ThrowAwayCluster} cluster */
async function runSpecs(cluster) {
  if (only !== 'e2e') {
    await runInZone(cluster, 'UTC');
  }
  if (only === undefined || only === 'unit') {
    await runInZone(cluster, 'America/New_York');
  }
  if (only === 'e2e' || (only === undefined && patterns.length === 0)) {
    await tally.run('Browser journeys', () => runJourneys(cluster));
  }
}

/**
 * @param {ThrowAwayCluster} cluster
 * @param {string} zone
 */
async function runInZone(cluster, zone) {
  await tally.run(`Specs, TZ=${zone}`, async () => {
    const environment = await cluster.makeDatabase('brakeven_test');
    return runJest({ environment: { ...environment, TZ: zone }, ...chooseSpecs() });
  });
}

/** @returns {Pick<JestOptions, 'paths' | 'withoutPaths'>} */
function chooseSpecs() {
  if (only === 'unit') {
    return { paths: patterns, withoutPaths: Object.values(specKinds) };
  }
  if (only === 'db' || only === 'api') {
    return { paths: patterns.length > 0 ? patterns : [specKinds[only]] };
  }
  return { paths: patterns };
}

/**
 * The journeys have a database of their own with the demo shop in it; their own global set-up starts the API.
 * @param {ThrowAwayCluster} cluster
 */
async function runJourneys(cluster) {
  const environment = await cluster.makeDatabase('brakeven_e2e');
  const { signIns } = await seedDemoShop(environment);
  return runJest({
    config: join(root, 'tests/e2e/jest.config.cjs'),
    environment: { ...environment, E2E_SIGN_INS: JSON.stringify(signIns) },
    paths: patterns,
    workers: 1,
  });
}

function readArguments() {
  try {
    const { values, positionals } = parseArgs({
      options: { only: { type: 'string' } },
      allowPositionals: true,
    });
    if (values.only !== undefined && !['unit', 'db', 'api', 'e2e', 'lint'].includes(values.only)) {
      throw new SetupError(`--only ${values.only} is not known.`);
    }
    return { only: values.only, patterns: positionals };
  } catch (error) {
    process.stderr.write(`${errorText(error)}\n${usage}\n`);
    process.exit(2);
  }
}
