import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { lastLines, run, untilShutDown } from './processes.mjs';
import { findStamp, setStamp, stateOf } from './stamps.mjs';
import { SetupError, root } from './workspace.mjs';

/** @typedef {'web' | 'api' | 'cli' | 'demo-shop'} Program */

const presets = ['nx.json', 'package-lock.json', 'tsconfig.base.json', 'tools/presets'];
const nodeLibs = ['libs', 'migrations'];

/** @type {Record<Program, { output: string, sources: string[] }>} */
const programs = {
  web: { output: 'dist/apps/web/index.html', sources: ['apps/web', 'libs', ...presets] },
  api: { output: 'dist/apps/api/main.js', sources: ['apps/api', ...nodeLibs, ...presets] },
  cli: { output: 'dist/apps/cli/main.js', sources: ['apps/cli', ...nodeLibs, ...presets] },
  'demo-shop': {
    output: 'dist/tools/demo-shop/main.js',
    sources: ['tools/demo-shop', ...nodeLibs, ...presets],
  },
};

/** Folder of the built web application. */
export const webRoot = join(root, 'dist/apps/web');

/**
 * @param {Program} program
 * @returns {string} its built file
 */
export function builtFile(program) {
  return join(root, programs[program].output);
}

/**
 * @param {Program[]} wanted
 * @returns {boolean} whether all of them were built from the sources as they are now
 */
export function areBuilt(wanted) {
  return wanted.every((program) => isBuilt(program, stateOf(programs[program].sources)));
}

/**
 * Builds those programs whose sources have changed.
 * @param {Program[]} wanted
 * @param {import('./progress.mjs').Progress} progress
 */
export async function ensureBuilt(wanted, progress) {
  // Taken before building, so that a change made during it is seen next time.
  const states = new Map(wanted.map((program) => [program, stateOf(programs[program].sources)]));
  const stale = wanted.filter((program) => !isBuilt(program, states.get(program) ?? ''));
  if (stale.length > 0) {
    await progress.step(`Building ${stale.join(', ')}`, () => buildAll(stale));
    const absent = stale.filter((program) => !existsSync(builtFile(program)));
    if (absent.length > 0) {
      throw new SetupError(`Nx reported success, but ${absent.map(builtFile).join(', ')} is not there.`);
    }
    stale.forEach((program) => setStamp(`built ${program}`, states.get(program) ?? ''));
  }
}

/**
 * Builds whatever the state of the sources; Nx answers from its cache what it has built before.
 * @param {Program[]} wanted
 */
async function buildAll(wanted) {
  const args = ['run-many', '-t', 'build', '-p', wanted.join(','), '--parallel=2', '--outputStyle=static'];
  const { code, output } = await run(process.execPath, [nxProgram, ...args], {
    env: { ...nxEnvironment(), FORCE_COLOR: '0' },
  });
  if (code !== 0) {
    await untilShutDown();
    throw new SetupError(`Building failed:\n${failingParts(output)}`);
  }
}

/**
 * @param {string} output of Nx: a part for each project, and the failed tasks' names at the end
 * @returns {string} the parts of the projects that failed; all of it when none can be told apart
 */
export function failingParts(output) {
  const failed = [...output.matchAll(/^- (\S+:\S+)/gm)].map(([, task]) => task);
  const parts = output
    .split(/^(?=> nx run )/m)
    .filter((part) => failed.some((task) => part.startsWith(`> nx run ${task}`)));
  return parts.length > 0 ? parts.join('\n').trimEnd() : lastLines(output, 120);
}

/** Nx's own entry, run by this Node. */
export const nxProgram = join(root, 'node_modules/nx/dist/bin/nx.js');

/** @returns {NodeJS.ProcessEnv} an environment in which Nx and Angular ask nothing and leave no server behind */
export function nxEnvironment() {
  return {
    ...process.env,
    NX_DAEMON: 'false',
    NX_TUI: 'false',
    NX_ISOLATE_PLUGINS: 'false',
    NG_CLI_ANALYTICS: 'false',
  };
}

/**
 * @param {Program} program
 * @param {string} state
 */
function isBuilt(program, state) {
  return findStamp(`built ${program}`) === state && existsSync(builtFile(program));
}
