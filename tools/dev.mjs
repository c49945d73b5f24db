import './setup/node-version.mjs';
import { nxEnvironment, nxProgram } from './setup/build.mjs';
import { describeDemoShop } from './setup/demo-shop.mjs';
import { findFreePort, startService, untilShutDown } from './setup/processes.mjs';
import { apiLog, seedDemoShop, startApi, turnApiLog } from './setup/programs.mjs';
import { createProgress, runScript } from './setup/progress.mjs';
import { announceInstance, refuseSecondInstance, stopAbandonedServer } from './setup/running-instance.mjs';
import { setUp, tellWaiting } from './setup/set-up.mjs';
import { withSetupLock } from './setup/setup-lock.mjs';
import { atShutdown, isShuttingDown } from './setup/shutdown.mjs';
import { SetupError, errorText } from './setup/workspace.mjs';

const progress = createProgress(process.stdout);

/** @typedef {import('./setup/configuration.mjs').DatabaseEnvironment} DatabaseEnvironment */
/** @typedef {import('./setup/processes.mjs').Service} Service */

await runScript(
  async () => {
    const webServer = await withSetupLock(serve, tellWaiting(progress));
    const code = await webServer.ended;
    await untilShutDown();
    throw new SetupError(`The web development server has ended by itself (code ${code}).`);
  },
  () => progress.say('\nStopping …'),
);

async function serve() {
  refuseSecondInstance();
  stopAbandonedServer();
  const environment = await setUp(['cli', 'demo-shop'], progress, { stopsAtEnd: true });
  const demoShop = await progress.step('Looking after the demo shop', (note) =>
    seedDemoShop(environment, note),
  );
  turnApiLog();
  const apiPort = await findFreePort(4280);
  const webPort = await findFreePort(4200);
  startReloadingApi(environment, apiPort);
  const webServer = startNx(['run', 'web:serve', `--port=${webPort}`], {
    API_ADDRESS: `http://127.0.0.1:${apiPort}`,
  });
  announceInstance(`http://127.0.0.1:${webPort}`, 0);
  progress.say(`\nBrakeven in development: http://127.0.0.1:${webPort}, API on port ${apiPort}\n`);
  progress.say(describeDemoShop(demoShop));
  return webServer;
}

/**
 * Rebuilds the API whenever its sources change, and starts it anew after each build.
 * @param {DatabaseEnvironment} environment
 * @param {number} port
 */
function startReloadingApi(environment, port) {
  /** @type {Service | null} */
  let api = null;
  const restart = async () => {
    await api?.stop();
    try {
      api = await startApi({
        environment,
        port,
        logFile: apiLog,
        onError: (line) => progress.say(line),
        mode: 'development',
      });
      progress.say('✓ The API is up');
    } catch (error) {
      api = null;
      if (!isShuttingDown()) {
        progress.say(errorText(error));
      }
    }
  };
  let queue = Promise.resolve();
  startNx(['run', 'api:build', '--watch'], {}, (text) => {
    if (/build succeeded/.test(text)) {
      queue = queue.then(restart);
    }
  });
}

/**
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} environment
 * @param {(text: string) => void} [onOutput]
 */
function startNx(args, environment, onOutput) {
  const service = startService(
    process.execPath,
    [nxProgram, ...args, '--outputStyle=stream-without-prefixes'],
    {
      env: { ...nxEnvironment(), ...environment },
      onOutput: (text) => {
        process.stdout.write(text);
        onOutput?.(text);
      },
    },
  );
  atShutdown(service.stop);
  return service;
}
