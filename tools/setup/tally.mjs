import { performance } from 'node:perf_hooks';
import { formatDuration } from './progress.mjs';
import { isShuttingDown } from './shutdown.mjs';
import { errorText } from './workspace.mjs';

/**
 * @typedef {object} Outcome
 * @property {number} passed
 * @property {number} failed
 * @property {number} skipped
 * @property {string} output shown in full when something failed
 */

/**
 * Counts over all suites. A step that passes takes one line; one that fails is shown in full.
 */
export class Tally {
  passed = 0;
  failed = 0;
  skipped = 0;

  /** @param {import('./progress.mjs').Progress} progress */
  constructor(progress) {
    this.progress = progress;
  }

  /**
   * Runs a suite; one that cannot be run at all counts as failed.
   * @param {string} title
   * @param {() => Promise<Outcome>} suite
   */
  async run(title, suite) {
    if (isShuttingDown()) {
      return;
    }
    this.progress.say(`\n── ${title}`);
    const begin = performance.now();
    const outcome = await attempt(suite);
    if (isShuttingDown()) {
      return;
    }
    this.passed += outcome.passed;
    this.failed += outcome.failed;
    this.skipped += outcome.skipped;
    if (outcome.failed > 0) {
      this.progress.say(outcome.output.trimEnd());
    }
    const duration = formatDuration(performance.now() - begin);
    this.progress.say(`${outcome.failed > 0 ? '✗' : '✓'} ${title}: ${describe(outcome)} (${duration})`);
  }

  /**
   * Counts what kept suites from being run at all as one failure.
   * @param {unknown} error
   */
  abort(error) {
    this.failed += 1;
    this.progress.say(`\n✗ ${errorText(error)}`);
  }

  /** @returns {string} 'N passed, N failed', and what was skipped if anything was */
  summary() {
    return describe(this);
  }
}

/**
 * A suite that is one check.
 * @param {() => Promise<{ code: number, output: string }>} check
 * @returns {() => Promise<Outcome>}
 */
export function asOneCheck(check) {
  return async () => {
    const { code, output } = await check();
    return { passed: code === 0 ? 1 : 0, failed: code === 0 ? 0 : 1, skipped: 0, output };
  };
}

/** @param {() => Promise<Outcome>} suite */
async function attempt(suite) {
  try {
    return await suite();
  } catch (error) {
    return { passed: 0, failed: 1, skipped: 0, output: errorText(error) };
  }
}

/** @param {{ passed: number, failed: number, skipped: number }} counts */
function describe({ passed, failed, skipped }) {
  return `${passed} passed, ${failed} failed${skipped > 0 ? `, ${skipped} skipped` : ''}`;
}
