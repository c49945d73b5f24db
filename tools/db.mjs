import './setup/node-version.mjs';
import { createInterface } from 'node:readline/promises';
import { ensureApplicationDatabase, openApplicationCluster } from './setup/application-database.mjs';
import { findConfiguration } from './setup/configuration.mjs';
import { ensureDebianPackages } from './setup/debian-packages.mjs';
import { createProgress, runScript } from './setup/progress.mjs';
import { findRunningInstance } from './setup/running-instance.mjs';
import { withSetupLock } from './setup/setup-lock.mjs';
import { forgetStamp } from './setup/stamps.mjs';
import { tellWaiting } from './setup/set-up.mjs';
import { SetupError } from './setup/workspace.mjs';

const usage = `Usage: npm run db -- start | stop | status | reset [--yes]

  start    make this checkout's database server if there is none, and start it
  stop     stop it; the data stays
  status   say where it is and whether it runs
  reset    delete all of its data (asks first, unless --yes is given)`;

const progress = createProgress(process.stdout);

/** @type {Record<string, () => Promise<number | void>>} */
const commands = { start, stop, status, reset };

await runScript(async () => {
  const [name = '', ...options] = process.argv.slice(2);
  const command = commands[name];
  const known = name === 'reset' ? ['--yes'] : [];
  if (!command || options.some((option) => !known.includes(option))) {
    throw new SetupError(usage, 2);
  }
  return command === status ? status() : withSetupLock(command, tellWaiting(progress));
});

async function start() {
  await ensureDebianPackages(['postgresql'], progress);
  const { cluster } = await ensureApplicationDatabase(progress);
  progress.say(`PostgreSQL runs on 127.0.0.1:${cluster.port}.`);
}

async function stop() {
  const cluster = findCluster();
  await cluster?.settle();
  if (!cluster?.findServer()) {
    progress.say('PostgreSQL does not run.');
    return;
  }
  await cluster.stop();
  progress.say('PostgreSQL has stopped; the data stays.');
}

async function status() {
  const cluster = findCluster();
  const server = cluster?.findServer();
  if (!cluster?.exists()) {
    progress.say('No database yet; npm start makes one.');
    return 1;
  }
  progress.say(
    server
      ? `PostgreSQL runs on 127.0.0.1:${server.port} (process ${server.pid}).`
      : 'PostgreSQL does not run.',
  );
  progress.say(`Data: ${cluster.dataDirectory}\nLog:  ${cluster.logFile}`);
  return server ? 0 : 1;
}

async function reset() {
  const instance = findRunningInstance();
  if (instance) {
    throw new SetupError(
      `Brakeven is running at ${instance.address}. Stop it first, with Ctrl-C where it was started.`,
    );
  }
  const cluster = findCluster();
  if (!cluster?.exists()) {
    progress.say('There is no data to delete.');
    return;
  }
  if (!process.argv.includes('--yes')) {
    await confirm(cluster.dataDirectory);
  }
  await cluster.settle();
  await cluster.stop();
  cluster.remove();
  forgetStamp('migrated');
  progress.say('All data has been deleted. npm start makes a new database with the demo shop.');
}

/** @param {string} directory */
async function confirm(directory) {
  if (!process.stdin.isTTY) {
    throw new SetupError('This deletes every shop and its books. Add --yes if that is what you want.', 2);
  }
  const terminal = createInterface({ input: process.stdin, output: process.stdout });
  const answer = await terminal
    .question(`Delete every shop and its books in ${directory}? Type yes: `)
    .catch(() => '');
  terminal.close();
  if (answer.trim().toLowerCase() !== 'yes') {
    throw new SetupError('Nothing was deleted.');
  }
}

function findCluster() {
  const configuration = findConfiguration();
  return configuration && openApplicationCluster(configuration);
}
