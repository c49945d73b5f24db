import { linkSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { isAlive } from './processes.mjs';
import { atShutdown } from './shutdown.mjs';
import { localDirectory, makeLocalDirectory } from './workspace.mjs';

const checkoutLock = join(localDirectory, 'setup.lock');

/**
 * Lets one script of this checkout at a time install, build, migrate or start the database. A lock left behind
 * by a killed script is taken over.
 * @template T
 * @param {() => Promise<T>} work
 * @param {(pid: number) => void} onWait told once, with the process that is being waited for
 * @param {string} [lockFile] the checkout's unless told
 * @returns {Promise<T>}
 */
export async function withSetupLock(work, onWait, lockFile = checkoutLock) {
  makeLocalDirectory();
  const draft = `${lockFile}.${process.pid}`;
  writeFileSync(draft, `${process.pid} ${startTime(process.pid)}\n`);
  const discard = atShutdown(() => rmSync(draft, { force: true }));
  let told = false;
  while (!tryLink(draft, lockFile)) {
    const holder = findHolder(lockFile);
    if (holder && !told) {
      onWait(holder);
      told = true;
    }
    await sleep(holder ? 200 : 20);
  }
  rmSync(draft, { force: true });
  discard();
  const release = () => rmSync(lockFile, { force: true });
  const forget = atShutdown(release);
  try {
    return await work();
  } finally {
    forget();
    release();
  }
}

/**
 * @param {string} draft
 * @param {string} lockFile
 */
function tryLink(draft, lockFile) {
  try {
    linkSync(draft, lockFile);
    return true;
  } catch {
    return false;
  }
}

/**
 * @param {string} lockFile
 * @returns {number | null} the living process that holds the lock; a dead one's lock is removed
 */
function findHolder(lockFile) {
  let text;
  try {
    text = readFileSync(lockFile, 'utf8');
  } catch {
    return null;
  }
  const [pid, started] = text.trim().split(' ');
  if (isAlive(Number(pid)) && startTime(Number(pid)) === started) {
    return Number(pid);
  }
  removeStale(text, lockFile);
  return null;
}

/**
 * Removes a dead holder's lock, unless another script has taken the lock over in the meantime.
 * @param {string} staleText content of the lock when it was found stale
 * @param {string} lockFile
 */
function removeStale(staleText, lockFile) {
  const aside = `${lockFile}.stale.${process.pid}`;
  try {
    renameSync(lockFile, aside);
    if (readFileSync(aside, 'utf8') !== staleText) {
      linkSync(aside, lockFile);
    }
  } catch {
    // Another script was quicker; the next attempt to take the lock shows who holds it.
  }
  rmSync(aside, { force: true });
}

/**
 * The kernel's start time tells a process from a later one that was given the same number.
 * @param {number} pid
 * @returns {string} empty when there is no such process
 */
function startTime(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ')[19] ?? '';
  } catch {
    return '';
  }
}
