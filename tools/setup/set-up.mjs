import { ensureApplicationDatabase } from './application-database.mjs';
import { areBuilt, ensureBuilt } from './build.mjs';
import { findConfiguration, programEnvironment } from './configuration.mjs';
import { DatabaseCluster } from './database-cluster.mjs';
import { ensureDebianPackages } from './debian-packages.mjs';
import { areNpmPackagesCurrent, ensureNpmPackages } from './npm-packages.mjs';
import { isMigrated, migrateApplicationDatabase } from './programs.mjs';
import { root } from './workspace.mjs';

/** @typedef {import('./build.mjs').Program} Program */
/** @typedef {import('./configuration.mjs').DatabaseEnvironment} DatabaseEnvironment */
/** @typedef {import('./progress.mjs').Progress} Progress */

/**
 * Does all that has to be done before a program can run: packages, database, build, migrations. What has been
 * done before is not done again.
 * @param {Program[]} programs
 * @param {Progress} progress
 * @param {{ stopsAtEnd: boolean }} options whether a cluster started here stops when the script ends
 * @returns {Promise<DatabaseEnvironment>}
 */
export async function setUp(programs, progress, options) {
  await ensureDebianPackages(['postgresql'], progress);
  await ensureNpmPackages(progress);
  const { environment } = await ensureApplicationDatabase(progress, options);
  await ensureBuilt(programs, progress);
  await migrateApplicationDatabase(environment, progress);
  return environment;
}

/**
 * The part of `setUp` that a command without a database needs.
 * @param {Program[]} programs
 * @param {Progress} progress
 */
export async function setUpPrograms(programs, progress) {
  await ensureNpmPackages(progress);
  await ensureBuilt(programs, progress);
}

/** @param {Program[]} programs */
export function areProgramsReady(programs) {
  return areNpmPackagesCurrent() && areBuilt(programs);
}

/**
 * @param {Program[]} programs
 * @returns {DatabaseEnvironment | null} where the database is, when nothing at all has to be set up
 */
export function findReadyEnvironment(programs) {
  const configuration = findConfiguration();
  if (configuration?.checkout !== root || !areProgramsReady(programs)) {
    return null;
  }
  const server = new DatabaseCluster(configuration.database).findServer();
  if (!server?.isReady || !isMigrated()) {
    return null;
  }
  return programEnvironment({
    ...configuration.database,
    port: server.port,
    sessionSecret: configuration.sessionSecret,
  });
}

/**
 * @param {Progress} progress
 * @returns {(pid: number) => void} tells that another script has to finish first
 */
export function tellWaiting(progress) {
  return (pid) => progress.say(`… Waiting for another script of this checkout (process ${pid})`);
}
