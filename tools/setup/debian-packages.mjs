import { existsSync, readFileSync } from 'node:fs';
import { isRoot } from './configuration.mjs';
import { findPostgresVersions } from './postgres-programs.mjs';
import { run, runOrThrow } from './processes.mjs';
import { SetupError } from './workspace.mjs';

/** @typedef {'postgresql' | 'chromium' | 'libreoffice-calc'} DebianPackage */

/** @type {Record<DebianPackage, () => boolean>} */
const isThere = {
  postgresql: () => findPostgresVersions().length > 0,
  chromium: () => existsSync('/usr/bin/chromium'),
  'libreoffice-calc': () =>
    existsSync('/usr/bin/soffice') && existsSync('/usr/lib/libreoffice/program/libsclo.so'),
};

/**
 * Sees to it that Debian packages are there: root has them installed, anyone else is told what to ask root for.
 * @param {DebianPackage[]} wanted
 * @param {import('./progress.mjs').Progress} progress
 */
export async function ensureDebianPackages(wanted, progress) {
  const missing = wanted.filter((name) => !isThere[name]());
  if (missing.length === 0) {
    return;
  }
  const command = `apt-get update && apt-get install -y --no-install-recommends ${missing.join(' ')}`;
  if (!existsSync('/usr/bin/apt-get')) {
    throw new SetupError(
      `Missing: ${missing.join(', ')}. This is ${systemName()}, not a Debian system; install them by its own means.`,
    );
  }
  if (!isRoot()) {
    throw new SetupError(
      `Missing Debian packages: ${missing.join(', ')}. Have them installed, then try again:\n\n  sudo sh -c '${command}'\n`,
    );
  }
  await progress.step(`Installing Debian packages: ${missing.join(', ')}`, () => install(missing, command));
}

/**
 * @param {DebianPackage[]} missing
 * @param {string} command what a person would type
 */
async function install(missing, command) {
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  // A mirror out of reach is no reason to stop yet: the lists from an earlier update may do.
  await run('apt-get', ['update', '-q'], { env });
  await runOrThrow(
    `apt-get could not install ${missing.join(', ')}. Mend what it says, or run it yourself: ${command}`,
    'apt-get',
    ['install', '-y', '-q', '--no-install-recommends', '-o', 'DPkg::Lock::Timeout=120', ...missing],
    { env },
  );
  const still = missing.filter((name) => !isThere[name]());
  if (still.length > 0) {
    throw new SetupError(`apt-get reported success, but ${still.join(', ')} cannot be found.`);
  }
}

function systemName() {
  try {
    return /^PRETTY_NAME="?([^"\n]*)/m.exec(readFileSync('/etc/os-release', 'utf8'))?.[1] ?? process.platform;
  } catch {
    return process.platform;
  }
}
