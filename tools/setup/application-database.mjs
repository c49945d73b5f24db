import {
  chooseDatabasePort,
  getConfiguration,
  programEnvironment,
  saveConfiguration,
} from './configuration.mjs';
import { ensureDatabase, ensureRoles } from './database-bootstrap.mjs';
import { DatabaseCluster } from './database-cluster.mjs';
import { atShutdown } from './shutdown.mjs';
import { forgetStamp } from './stamps.mjs';

/** @typedef {import('./configuration.mjs').Configuration} Configuration */
/** @typedef {import('./configuration.mjs').DatabaseEnvironment} DatabaseEnvironment */
/** @typedef {import('./progress.mjs').Progress} Progress */

/**
 * @param {Configuration} configuration
 * @returns {DatabaseCluster} this checkout's own cluster
 */
export function openApplicationCluster({ database }) {
  return new DatabaseCluster(database);
}

/**
 * Starts this checkout's cluster when it does not run, made first when there is none, with its roles and its
 * database.
 * @param {Progress} progress
 * @param {{ stopsAtEnd?: boolean }} [options] whether a cluster started here stops when the script ends
 * @returns {Promise<{ cluster: DatabaseCluster, environment: DatabaseEnvironment }>}
 */
export async function ensureApplicationDatabase(progress, { stopsAtEnd = false } = {}) {
  const configuration = await getConfiguration();
  const { database } = configuration;
  let cluster = openApplicationCluster(configuration);
  if (!cluster.exists()) {
    forgetStamp('migrated');
    await progress.step('Making a PostgreSQL cluster', () => cluster.initialise());
  }
  await cluster.settle();
  const server = cluster.findServer();
  if (server) {
    cluster.port = server.port;
  } else {
    if (stopsAtEnd) {
      atShutdown(() => openApplicationCluster(configuration).stop());
    }
    cluster = await progress.step('Starting PostgreSQL', () => startOnSomePort(configuration, cluster));
  }
  await admitUs(cluster);
  await ensureRoles(cluster, database);
  await ensureDatabase(cluster, 'brakeven');
  return {
    cluster,
    environment: programEnvironment({
      ...database,
      port: cluster.port,
      sessionSecret: configuration.sessionSecret,
    }),
  };
}

/**
 * Starts on the remembered port, or on another one, remembered from then on, when somebody has taken that.
 * @param {Configuration} configuration
 * @param {DatabaseCluster} cluster
 */
async function startOnSomePort(configuration, cluster) {
  for (let attempt = 1; ; attempt += 1) {
    try {
      await cluster.start();
      return cluster;
    } catch (error) {
      const isTaken = error instanceof Error && 'code' in error && error.code === 'EADDRINUSE';
      if (!isTaken || attempt === 5) {
        throw error;
      }
    }
    configuration.database.port = await chooseDatabasePort();
    saveConfiguration(configuration);
    cluster = openApplicationCluster(configuration);
  }
}

/**
 * The data outlives a lost `.local/config.json`; the new passwords are then set from inside.
 * @param {DatabaseCluster} cluster
 */
async function admitUs(cluster) {
  const { code, output } = await cluster.query('select 1;');
  if (code !== 0 && /password authentication failed/.test(output)) {
    await cluster.stop();
    await cluster.resetSuperuserPassword();
    await cluster.start();
  }
}
