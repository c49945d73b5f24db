import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { runOrThrow } from './processes.mjs';
import { findJson, root } from './workspace.mjs';

const lockfile = join(root, 'package-lock.json');
const modules = join(root, 'node_modules');
const stampFile = join(modules, '.brakeven-installed');
const installedList = join(modules, '.package-lock.json');

/** @returns {boolean} whether the stamp says that node_modules holds what package-lock.json asks for */
export function areNpmPackagesCurrent() {
  return existsSync(stampFile) && readFileSync(stampFile, 'utf8') === lockfileHash();
}

/**
 * Installs the npm packages of package-lock.json when node_modules lacks some of them.
 * @param {import('./progress.mjs').Progress} progress
 */
export async function ensureNpmPackages(progress) {
  if (areNpmPackagesCurrent()) {
    return;
  }
  if (!holdsAll()) {
    await progress.step('Installing npm packages', install);
  }
  writeFileSync(stampFile, lockfileHash());
}

function install() {
  const npm = process.env.npm_execpath;
  const args = ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'];
  const what = 'npm could not install the packages. Mend what it says, or run it yourself: npm ci';
  return npm?.endsWith('.js')
    ? runOrThrow(what, process.execPath, [npm, ...args])
    : runOrThrow(what, 'npm', args);
}

/**
 * npm writes its list of what it installed last of all, so an interrupted installation has none or an old one.
 */
function holdsAll() {
  const installed = existsSync(installedList) ? findJson(installedList).packages : {};
  return Object.entries(findJson(lockfile).packages).every(
    ([path, wanted]) => path === '' || wanted.optional || installed[path]?.version === wanted.version,
  );
}

function lockfileHash() {
  return createHash('sha256').update(readFileSync(lockfile)).digest('hex');
}
