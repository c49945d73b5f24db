import { existsSync, readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { SetupError } from './workspace.mjs';

const home = '/usr/lib/postgresql';
const needed = ['initdb', 'pg_ctl', 'postgres', 'psql'];

/** @returns {number[]} major versions of PostgreSQL that are installed whole, newest first */
export function findPostgresVersions() {
  if (!existsSync(home)) {
    return [];
  }
  return readdirSync(home)
    .filter((version) => needed.every((program) => existsSync(join(home, version, 'bin', program))))
    .map(Number)
    .filter(Number.isInteger)
    .sort((a, b) => b - a);
}

/**
 * Chooses the programs for a data directory: those of the version that wrote it, else the newest.
 * @param {string} dataDirectory
 * @returns {string} folder of the programs
 */
export function getPostgresPrograms(dataDirectory) {
  const versions = findPostgresVersions();
  const versionFile = join(dataDirectory, 'PG_VERSION');
  const version = existsSync(versionFile) ? Number(readFileSync(versionFile, 'utf8')) : versions[0];
  if (version === undefined || !versions.includes(version)) {
    throw new SetupError(
      `The data in ${dataDirectory} was written by PostgreSQL ${version}, which is not installed ` +
        `(found: ${versions.join(', ') || 'none'}). Install postgresql-${version}, or start afresh with: npm run db -- reset`,
    );
  }
  return join(home, String(version), 'bin');
}
