import { createHash } from 'node:crypto';
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join, relative } from 'node:path';
import { findJson, localDirectory, root, writeJson } from './workspace.mjs';

const stampsFile = join(localDirectory, 'stamps.json');

/**
 * @param {string} name of a step that has been done
 * @returns {string | undefined} the state of the sources it was done with
 */
export function findStamp(name) {
  return readStamps()[name];
}

/**
 * @param {string} name
 * @param {string} state
 */
export function setStamp(name, state) {
  writeJson(stampsFile, { ...readStamps(), [name]: state });
}

/** @param {string} name of the step that has to be done again */
export function forgetStamp(name) {
  const { [name]: _forgotten, ...others } = readStamps();
  writeJson(stampsFile, others);
}

/**
 * State of a set of sources, by each file's path, size and time of change; tests do not count.
 * @param {string[]} paths files and folders, relative to the checkout; those missing count as missing
 * @returns {string}
 */
export function stateOf(paths) {
  const hash = createHash('sha256');
  paths.forEach((path) => addPath(hash, join(root, path)));
  return hash.digest('hex');
}

/**
 * @param {import('node:crypto').Hash} hash
 * @param {string} path
 */
function addPath(hash, path) {
  const stat = statSync(path, { throwIfNoEntry: false });
  if (stat?.isDirectory()) {
    readdirSync(path)
      .filter((name) => name !== 'node_modules' && !/\.spec\.ts$/.test(name))
      .sort()
      .forEach((name) => addPath(hash, join(path, name)));
  } else if (stat) {
    hash.update(`${relative(root, path)}\0${stat.size}\0${stat.mtimeMs}\0`);
  }
}

/** Stamps that cannot be read are no stamps: the steps are done again. */
function readStamps() {
  try {
    return existsSync(stampsFile) ? findJson(stampsFile) : {};
  } catch {
    return {};
  }
}
