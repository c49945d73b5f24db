import { createHash } from 'node:crypto';
import {
  accessSync,
  constants,
  mkdirSync,
  readFileSync,
  realpathSync,
  renameSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The checkout these scripts belong to, without symbolic links. */
export const root = realpathSync(fileURLToPath(new URL('../..', import.meta.url)));

/** Everything a checkout keeps for itself: configuration, stamps, logs; never committed. */
export const localDirectory = join(root, '.local');

/** Short name of this checkout, different for every path. */
export const checkoutName = createHash('sha256').update(root).digest('hex').slice(0, 12);

/** Exit code of the command line when it does not get to the database. */
export const databaseOutOfReach = 3;

/**
 * A failure whose message tells the reader what to do; scripts print it without a stack.
 */
export class SetupError extends Error {
  /**
   * @param {string} message what happened and what to do
   * @param {number} [exitCode] exit code of the script, 1 unless told
   */
  constructor(message, exitCode = 1) {
    super(message);
    this.exitCode = exitCode;
  }
}

/** Makes `.local`, readable by its owner only, and says who is in the way when that fails. */
export function makeLocalDirectory() {
  try {
    mkdirSync(localDirectory, { recursive: true, mode: 0o700 });
    accessSync(localDirectory, constants.W_OK | constants.X_OK);
  } catch (error) {
    throw new SetupError(
      `${localDirectory} cannot be written (${errorText(error)}). ` +
        'Run as the user it belongs to, or give it to yourself with chown.',
    );
  }
}

/**
 * Reads a JSON file.
 * @param {string} file
 * @returns {any} its content, or null when there is no such file; throws when it is not JSON
 */
export function findJson(file) {
  let text;
  try {
    text = readFileSync(file, 'utf8');
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') {
      return null;
    }
    throw error;
  }
  return JSON.parse(text);
}

/**
 * Writes a JSON file whole or not at all, readable by its owner only.
 * @param {string} file
 * @param {unknown} content
 */
export function writeJson(file, content) {
  const draft = `${file}.${process.pid}`;
  writeFileSync(draft, `${JSON.stringify(content, null, 2)}\n`, { mode: 0o600 });
  renameSync(draft, file);
}

/**
 * @param {unknown} error
 * @returns {string} its message
 */
export function errorText(error) {
  return error instanceof Error ? error.message : String(error);
}
