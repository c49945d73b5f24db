import './setup/node-version.mjs';
import { spawn } from 'node:child_process';
import { constants } from 'node:os';
import { builtFile } from './setup/build.mjs';
import { createProgress, runScript } from './setup/progress.mjs';
import {
  areProgramsReady,
  findReadyEnvironment,
  setUp,
  setUpPrograms,
  tellWaiting,
} from './setup/set-up.mjs';
import { withSetupLock } from './setup/setup-lock.mjs';
import { errorText } from './setup/workspace.mjs';

// Standard output belongs to the command.
const progress = createProgress(process.stderr);
const args = process.argv.slice(2);

/** The commands that look nothing up; every other one finds the database started and up to date. */
const WITHOUT_DATABASE = /^(forming (force|blank|depth)|setup template)\b/;

await runScript(async () => {
  const environment = needsDatabase() ? await prepareDatabase() : await preparePrograms();
  return runCommand({ ...process.env, ...environment });
});

function needsDatabase() {
  const isQuestion = args.length === 0 || args.some((arg) => ['--help', '-h'].includes(arg));
  return !isQuestion && !WITHOUT_DATABASE.test(args.join(' '));
}

async function prepareDatabase() {
  return (
    findReadyEnvironment(['cli']) ??
    (await withSetupLock(() => setUp(['cli'], progress, { stopsAtEnd: false }), tellWaiting(progress)))
  );
}

async function preparePrograms() {
  if (!areProgramsReady(['cli'])) {
    await withSetupLock(() => setUpPrograms(['cli'], progress), tellWaiting(progress));
  }
  return {};
}

/**
 * Runs the command where the caller stands, so that its relative paths are the caller's. A Ctrl-C reaches it
 * from the terminal itself.
 * @param {NodeJS.ProcessEnv} env
 * @returns {Promise<number>} its exit code
 */
function runCommand(env) {
  const isByNpm = process.env.npm_lifecycle_event === 'cli';
  const cwd = (isByNpm && process.env.INIT_CWD) || process.cwd();
  const child = spawn(process.execPath, [builtFile('cli'), ...args], {
    cwd,
    env,
    stdio: 'inherit',
  });
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
    process.removeAllListeners(signal);
    process.on(signal, () => signal !== 'SIGINT' && child.kill(signal));
  }
  return new Promise((done) => {
    child.on('error', (error) => {
      progress.say(errorText(error));
      done(1);
    });
    child.on('exit', (code, signal) => done(code ?? 128 + constants.signals[signal ?? 'SIGTERM']));
  });
}
