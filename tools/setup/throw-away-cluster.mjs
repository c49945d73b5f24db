import { mkdtempSync, readdirSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { chooseDatabasePort, isRoot, newPassword, programEnvironment } from './configuration.mjs';
import { ensureRoles, recreateDatabase } from './database-bootstrap.mjs';
import { DatabaseCluster } from './database-cluster.mjs';
import { isAlive } from './processes.mjs';
import { migrate } from './programs.mjs';
import { atShutdown } from './shutdown.mjs';

/**
 * A cluster for tests or measurements, deleted when the script ends, however it ends.
 * @typedef {object} ThrowAwayCluster
 * @property {(database: string) => Promise<import('./configuration.mjs').DatabaseEnvironment>} makeDatabase makes a
 *   database anew, migrated but empty, and says how to reach it
 */

/**
 * @param {import('./progress.mjs').Progress} progress
 * @returns {Promise<ThrowAwayCluster>}
 */
export async function startThrowAwayCluster(progress) {
  removeAbandoned();
  const passwords = {
    superuserPassword: newPassword(),
    ownerPassword: newPassword(),
    applicationPassword: newPassword(),
  };
  const cluster = await progress.step('Starting a throw-away PostgreSQL', () => start(passwords));
  return {
    async makeDatabase(database) {
      await recreateDatabase(cluster, database);
      const access = { ...passwords, port: cluster.port, sessionSecret: newPassword() };
      const environment = programEnvironment(access, database);
      await migrate(environment);
      return environment;
    },
  };
}

/** @param {{ superuserPassword: string, ownerPassword: string, applicationPassword: string }} passwords */
async function start(passwords) {
  const cluster = new DatabaseCluster({
    directory: mkdtempSync(join(place(), `brakeven-test-${process.pid}-`)),
    port: await chooseDatabasePort(),
    superuserPassword: passwords.superuserPassword,
    isThrowAway: true,
  });
  process.once('exit', () => cluster.destroyNow());
  atShutdown(async () => {
    await cluster.stop();
    cluster.remove();
  });
  await cluster.initialise();
  await cluster.start();
  await ensureRoles(cluster, passwords);
  return cluster;
}

/** Somebody's own TMPDIR may lie where the postgres user cannot look. */
function place() {
  return isRoot() ? '/tmp' : tmpdir();
}

/** Removes what test runs that were killed have left. */
function removeAbandoned() {
  for (const name of readdirSync(place())) {
    const pid = Number(/^brakeven-test-(\d+)-/.exec(name)?.[1] ?? process.pid);
    if (!isAlive(pid)) {
      removeCluster(join(place(), name));
    }
  }
}

/** @param {string} directory */
function removeCluster(directory) {
  try {
    new DatabaseCluster({ directory, port: 0, superuserPassword: '' }).destroyNow();
  } catch {
    // It is another user's, whose next run removes it.
  }
}
