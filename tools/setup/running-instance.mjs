import { rmSync } from 'node:fs';
import { join } from 'node:path';
import { builtFile } from './build.mjs';
import { commandLine } from './processes.mjs';
import { atShutdown } from './shutdown.mjs';
import { SetupError, findJson, localDirectory, root, writeJson } from './workspace.mjs';

const instanceFile = join(localDirectory, 'running.json');

/**
 * @typedef {object} RunningInstance
 * @property {number} pid of the script that serves
 * @property {number} apiPid of the server it has started
 * @property {string} address
 */

/** @returns {RunningInstance | null} the `npm start` or `npm run dev` of this checkout that is serving now */
export function findRunningInstance() {
  const found = readInstance();
  const isOurs = found && commandLine(found.pid).some((word) => /(^|\/)tools\/(start|dev)\.mjs$/.test(word));
  return isOurs ? found : null;
}

/** Refuses to serve when this checkout is being served already. */
export function refuseSecondInstance() {
  const instance = findRunningInstance();
  if (instance) {
    throw new SetupError(`Brakeven is already running at ${instance.address} (process ${instance.pid}).`);
  }
}

/** Ends the server that a killed `npm start` has left behind. */
export function stopAbandonedServer() {
  const found = readInstance();
  if (found && !findRunningInstance() && commandLine(found.apiPid).includes(builtFile('api'))) {
    process.kill(found.apiPid, 'SIGTERM');
  }
}

/**
 * Tells later scripts that this one serves, until it ends.
 * @param {string} address
 * @param {number} apiPid
 */
export function announceInstance(address, apiPid) {
  writeJson(instanceFile, { pid: process.pid, apiPid, address, checkout: root });
  atShutdown(() => rmSync(instanceFile, { force: true }));
}

/** @returns {RunningInstance | null} */
function readInstance() {
  try {
    const found = findJson(instanceFile);
    return found?.checkout === root ? found : null;
  } catch {
    return null;
  }
}
