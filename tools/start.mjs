import './setup/node-version.mjs';
import { performance } from 'node:perf_hooks';
import { parseArgs } from 'node:util';
import { getConfiguration, saveConfiguration } from './setup/configuration.mjs';
import { describeDemoShop } from './setup/demo-shop.mjs';
import { findFreePort, isPortFree, isWebPort, untilShutDown } from './setup/processes.mjs';
import { apiLog, seedDemoShop, startApi, turnApiLog } from './setup/programs.mjs';
import { createProgress, formatDuration, runScript } from './setup/progress.mjs';
import { announceInstance, refuseSecondInstance, stopAbandonedServer } from './setup/running-instance.mjs';
import { setUp, tellWaiting } from './setup/set-up.mjs';
import { withSetupLock } from './setup/setup-lock.mjs';
import { SetupError, errorText } from './setup/workspace.mjs';

const usage = 'Usage: npm start [-- --port NUMBER]';
const progress = createProgress(process.stdout);
const begin = performance.now();

/** @typedef {import('./setup/configuration.mjs').DatabaseEnvironment} DatabaseEnvironment */

await runScript(
  async () => {
    const wantedPort = readPort();
    const service = await withSetupLock(() => serve(wantedPort), tellWaiting(progress));
    const code = await service.ended;
    await untilShutDown();
    throw new SetupError(`The server has ended by itself (code ${code}). Its log: ${apiLog}`);
  },
  () => progress.say('\nStopping …'),
);

/** @param {number | undefined} wantedPort */
async function serve(wantedPort) {
  refuseSecondInstance();
  stopAbandonedServer();
  const environment = await setUp(['api', 'cli', 'demo-shop', 'web'], progress, { stopsAtEnd: true });
  turnApiLog();
  // Together, because the demo shop is there already at all starts but the first.
  const [service, demoShop] = await progress.step('Starting the server and the demo shop', (note) =>
    Promise.all([startOnSomePort(environment, wantedPort), seedDemoShop(environment, note)]),
  );
  announceInstance(service.address, service.pid);
  progress.say(`\nBrakeven is ready at ${service.address} (${formatDuration(performance.now() - begin)})\n`);
  progress.say(describeDemoShop(demoShop));
  progress.say('Ctrl-C stops it; the data stays.');
  return service;
}

/**
 * Serves on the port asked for, else on the remembered one or the next that is free, remembered from then on.
 * @param {DatabaseEnvironment} environment
 * @param {number | undefined} wantedPort
 */
async function startOnSomePort(environment, wantedPort) {
  const configuration = await getConfiguration();
  if (wantedPort && !(await isPortFree(wantedPort))) {
    throw new SetupError(`Port ${wantedPort} on 127.0.0.1 is taken by another program. Name another one.`);
  }
  for (let attempt = 1; ; attempt += 1) {
    const port = wantedPort ?? (await findFreePort(configuration.webPort));
    try {
      const service = await startApi({
        environment,
        port,
        logFile: apiLog,
        onError: (line) => progress.say(line),
      });
      saveConfiguration({ ...configuration, webPort: port });
      return service;
    } catch (error) {
      const isTaken = error instanceof Error && 'code' in error && error.code === 'EADDRINUSE';
      if (!isTaken || wantedPort || attempt === 3) {
        throw error;
      }
    }
  }
}

function readPort() {
  try {
    const { port } = parseArgs({ options: { port: { type: 'string' } } }).values;
    if (port !== undefined && !isWebPort(Number(port))) {
      throw new SetupError(
        '--port takes a number from 1024 to 65535, but none that browsers refuse, such as 6000.',
      );
    }
    return port === undefined ? undefined : Number(port);
  } catch (error) {
    throw new SetupError(`${errorText(error)}\n${usage}`, 2);
  }
}
