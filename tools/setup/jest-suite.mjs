import { mkdtempSync, rmSync } from 'node:fs';
import { availableParallelism, tmpdir } from 'node:os';
import { join } from 'node:path';
import { run } from './processes.mjs';
import { atShutdown } from './shutdown.mjs';
import { findJson, root } from './workspace.mjs';

const jest = join(root, 'node_modules/jest/bin/jest.js');
const timeLimitMs = 15 * 60_000;

/** Files of the four kinds of specs; those in tests/cli run the built programs. */
export const specKinds = {
  db: '\\.db\\.spec\\.ts$',
  api: '\\.api\\.spec\\.ts$',
  cli: '/tests/cli/',
};

/**
 * @typedef {object} JestOptions
 * @property {string} [config] every project's unless told
 * @property {NodeJS.ProcessEnv} environment
 * @property {string[]} [paths] patterns of the files to run; all unless told
 * @property {string[]} [withoutPaths] patterns of files left out
 * @property {number} [workers] as many as there are processors unless told
 */

/**
 * Runs specs with Jest and counts them from its own report. Files that could not be loaded, a run that ends
 * badly although every test passed, and a run without a single test count as failed.
 * @param {JestOptions} options
 * @returns {Promise<import('./tally.mjs').Outcome>}
 */
export async function runJest(options) {
  const directory = mkdtempSync(join(tmpdir(), 'brakeven-jest-'));
  const clear = () => rmSync(directory, { recursive: true, force: true });
  const forget = atShutdown(clear);
  try {
    const report = join(directory, 'report.json');
    const { code, output } = await run(process.execPath, [jest, ...toArguments(options, report)], {
      env: { ...process.env, ...options.environment, FORCE_COLOR: '0' },
      timeLimitMs,
    });
    return countTests(findJson(report), code, output);
  } finally {
    forget();
    clear();
  }
}

/**
 * @param {JestOptions} options
 * @param {string} report
 */
function toArguments({ config, paths = [], withoutPaths = [], workers = availableParallelism() }, report) {
  return [
    ...['--config', config ?? join(root, 'tools/presets/jest.all.cjs')],
    ...['--ci', '--json', `--outputFile=${report}`, `--maxWorkers=${workers}`, '--passWithNoTests'],
    ...withoutPaths.map((pattern) => `--testPathIgnorePatterns=${pattern}`),
    ...paths,
  ];
}

/**
 * @param {any} report what Jest wrote, null when it wrote nothing
 * @param {number} code its exit code
 * @param {string} output
 * @returns {import('./tally.mjs').Outcome}
 */
export function countTests(report, code, output) {
  if (!report) {
    return {
      passed: 0,
      failed: 1,
      skipped: 0,
      output: `${output}\nJest ended without a report (code ${code}).`,
    };
  }
  const { numPassedTests: passed, numRuntimeErrorTestSuites: broken } = report;
  const skipped = report.numPendingTests + report.numTodoTests;
  const failed = report.numFailedTests + broken;
  if (failed === 0 && (code !== 0 || passed === 0)) {
    const why = code === 0 ? 'Not a single test was found or run.' : `Jest ended badly (code ${code}).`;
    return { passed, failed: 1, skipped, output: `${output}\n${why}` };
  }
  return { passed, failed, skipped, output };
}
