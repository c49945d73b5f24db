import { randomBytes, randomInt } from 'node:crypto';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { isPortFree } from './processes.mjs';
import {
  SetupError,
  checkoutName,
  errorText,
  findJson,
  localDirectory,
  makeLocalDirectory,
  root,
  writeJson,
} from './workspace.mjs';

const configurationFile = join(localDirectory, 'config.json');

/**
 * @typedef {object} DatabaseConfiguration
 * @property {number} port on 127.0.0.1
 * @property {string} directory holds the data and the server's log
 * @property {string} superuserPassword
 * @property {string} ownerPassword of brakeven_owner
 * @property {string} applicationPassword of brakeven_app
 */

/**
 * What a checkout remembers between runs, in `.local/config.json`, readable by its owner only.
 * @typedef {object} Configuration
 * @property {string} checkout where the checkout was when this was written
 * @property {number} webPort
 * @property {string} sessionSecret
 * @property {DatabaseConfiguration} database
 */

/**
 * @typedef {object} DatabaseEnvironment
 * @property {string} DATABASE_URL as brakeven_app
 * @property {string} DATABASE_OWNER_URL as brakeven_owner
 * @property {string} SESSION_SECRET
 */

/** @returns {boolean} whether the script runs as root */
export function isRoot() {
  return process.getuid?.() === 0;
}

/** @returns {string} a random password of letters, digits, '-' and '_' */
export function newPassword() {
  return randomBytes(24).toString('base64url');
}

/**
 * @returns {Configuration | null} what the checkout remembers, null before its first set-up
 */
export function findConfiguration() {
  let found;
  try {
    found = findJson(configurationFile);
  } catch (error) {
    throw new SetupError(
      `${configurationFile} cannot be read (${errorText(error)}). Delete it: it is written anew, and the data is kept.`,
    );
  }
  return found && isComplete(found) ? found : null;
}

/**
 * Gives the checkout's configuration, made on first use. A copied checkout gets a database of its own; a moved
 * one keeps its data.
 * @returns {Promise<Configuration>}
 */
export async function getConfiguration() {
  makeLocalDirectory();
  const found = findConfiguration();
  if (found?.checkout === root) {
    return found;
  }
  if (found && !existsSync(found.checkout)) {
    const moved = {
      ...found,
      checkout: root,
      database: { ...found.database, directory: movedDirectory(found) },
    };
    saveConfiguration(moved);
    return moved;
  }
  const fresh = {
    checkout: root,
    webPort: 4180,
    sessionSecret: newPassword(),
    database: {
      port: await chooseDatabasePort(),
      directory: defaultDirectory(),
      superuserPassword: newPassword(),
      ownerPassword: newPassword(),
      applicationPassword: newPassword(),
    },
  };
  saveConfiguration(fresh);
  return fresh;
}

/** @param {Configuration} configuration */
export function saveConfiguration(configuration) {
  writeJson(configurationFile, configuration);
}

/**
 * Ports below the range that the kernel hands out to outgoing connections, so that none of those can hold ours
 * when the cluster starts again.
 * @returns {Promise<number>} a free one
 */
export async function chooseDatabasePort() {
  for (;;) {
    const port = randomInt(20_000, 32_000);
    if (await isPortFree(port)) {
      return port;
    }
  }
}

/**
 * Environment of the programs under `dist`, for one database.
 * @param {{ port: number, ownerPassword: string, applicationPassword: string, sessionSecret: string }} access
 * @param {string} [database]
 * @returns {DatabaseEnvironment}
 */
export function programEnvironment(access, database = 'brakeven') {
  const at = `127.0.0.1:${access.port}/${database}`;
  return {
    DATABASE_URL: `postgres://brakeven_app:${access.applicationPassword}@${at}`,
    DATABASE_OWNER_URL: `postgres://brakeven_owner:${access.ownerPassword}@${at}`,
    SESSION_SECRET: access.sessionSecret,
  };
}

/**
 * PostgreSQL does not run as root and its own user cannot look into every home, so root's data lies elsewhere.
 */
function defaultDirectory() {
  return isRoot() ? join('/var/lib/brakeven', checkoutName) : join(localDirectory, 'postgres');
}

/** @param {Configuration} configuration */
function movedDirectory({ checkout, database }) {
  const inCheckout = `${checkout}/`;
  return database.directory.startsWith(inCheckout)
    ? join(root, database.directory.slice(inCheckout.length))
    : database.directory;
}

/**
 * @param {any} found
 * @returns {boolean} whether nothing is missing, and the passwords can stand in SQL and in addresses
 */
function isComplete(found) {
  const { database } = found;
  const passwords = [database?.superuserPassword, database?.ownerPassword, database?.applicationPassword];
  return (
    [found.checkout, found.sessionSecret, database?.directory].every((text) => typeof text === 'string') &&
    passwords.every((password) => /^[\w-]{16,}$/.test(password)) &&
    [found.webPort, database.port].every(Number.isInteger)
  );
}
