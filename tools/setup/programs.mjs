import { appendFileSync, existsSync, renameSync } from 'node:fs';
import { join } from 'node:path';
import { builtFile, webRoot } from './build.mjs';
import { lastLines, runOrThrow, startService, waitUntil } from './processes.mjs';
import { atShutdown } from './shutdown.mjs';
import { findStamp, setStamp, stateOf } from './stamps.mjs';
import { SetupError, localDirectory } from './workspace.mjs';

/** @typedef {import('./configuration.mjs').DatabaseEnvironment} DatabaseEnvironment */
/** @typedef {import('./progress.mjs').Progress} Progress */

/** @returns {boolean} whether the migrations as they are now have been run on this checkout's database */
export function isMigrated() {
  return findStamp('migrated') === stateOf(['migrations']);
}

/**
 * Brings this checkout's database to the newest schema when the migrations have changed since it was last done.
 * @param {DatabaseEnvironment} environment
 * @param {Progress} progress
 */
export async function migrateApplicationDatabase(environment, progress) {
  const state = stateOf(['migrations']);
  if (findStamp('migrated') === state) {
    return;
  }
  await progress.step('Migrating the database', () => migrate(environment));
  setStamp('migrated', state);
}

/**
 * Runs the migrations that are pending.
 * @param {DatabaseEnvironment} environment
 */
export async function migrate(environment) {
  await runOrThrow(
    'The database could not be migrated',
    process.execPath,
    [builtFile('cli'), 'database', 'migrate'],
    {
      env: { ...process.env, ...environment },
    },
  );
}

/**
 * @typedef {object} SignIn
 * @property {string} role
 * @property {string} email
 * @property {string} password
 */

/**
 * @typedef {object} DemoShop
 * @property {SignIn[]} signIns none when there are other shops but no demo shop
 * @property {string | null} timesheet a workbook to try the import with
 */

/**
 * Fills a database that has no shop yet with the demo shop.
 * @param {DatabaseEnvironment} environment
 * @param {(remark: string) => void} [note] told how far it is
 * @returns {Promise<DemoShop>}
 */
export async function seedDemoShop(environment, note) {
  const args = [builtFile('demo-shop'), join(localDirectory, 'demo')];
  const answer = await runOrThrow('The demo shop could not be made', process.execPath, args, {
    env: { ...process.env, ...environment },
    onOutput: (text) => text.startsWith('{') || note?.(lastLines(text, 1)),
  });
  return JSON.parse(answer);
}

/**
 * @typedef {object} ApiOptions
 * @property {DatabaseEnvironment} environment
 * @property {number} port on 127.0.0.1
 * @property {string} logFile where its log is added to
 * @property {(line: string) => void} onError told of each error that the server logs
 * @property {string} [mode] NODE_ENV
 */

/**
 * Starts the built API, which serves the web application as well, and waits until it answers.
 * @param {ApiOptions} options
 * @returns {Promise<import('./processes.mjs').Service & { address: string }>}
 */
export async function startApi({ environment, port, logFile, onError, mode = 'production' }) {
  const address = `http://127.0.0.1:${port}`;
  let said = '';
  const service = startService(process.execPath, [builtFile('api')], {
    env: {
      ...process.env,
      ...environment,
      HOST: '127.0.0.1',
      PORT: String(port),
      WEB_ROOT: webRoot,
      NODE_ENV: mode,
    },
    onOutput: (text) => {
      said = (said + text).slice(-20_000);
      appendFileSync(logFile, text);
      text.split('\n').filter(isErrorLine).forEach(onError);
    },
  });
  const forget = atShutdown(service.stop);
  let hasEnded = false;
  void service.ended.then(() => {
    hasEnded = true;
    forget();
  });
  const isUp = await waitUntil(async () => hasEnded || (await isHealthy(address)), 60_000, 50);
  if (hasEnded || !isUp) {
    await service.stop();
    throw Object.assign(
      new SetupError(`The server did not start on port ${port}. It said:\n${lastLines(said, 30)}`),
      /EADDRINUSE/.test(said) ? { code: 'EADDRINUSE' } : {},
    );
  }
  return { ...service, address };
}

/** Where the API's log goes; the one of the run before is kept beside it. */
export const apiLog = join(localDirectory, 'api.log');

/** Begins a new log of the API. */
export function turnApiLog() {
  if (existsSync(apiLog)) {
    renameSync(apiLog, `${apiLog}.1`);
  }
}

/** @param {string} address */
async function isHealthy(address) {
  try {
    return (await fetch(`${address}/api/health`, { signal: AbortSignal.timeout(2_000) })).ok;
  } catch {
    return false;
  }
}

/**
 * The API logs one JSON object a line, with a level of 50 for errors; anything else on a line of its own is
 * Node's own word about a crash.
 * @param {string} line
 */
function isErrorLine(line) {
  if (line.trim() === '') {
    return false;
  }
  try {
    return JSON.parse(line).level >= 50;
  } catch {
    return !line.startsWith('{');
  }
}
