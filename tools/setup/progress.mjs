import { performance } from 'node:perf_hooks';
import { isShuttingDown, shutDown, stopOnSignals } from './shutdown.mjs';
import { SetupError, errorText } from './workspace.mjs';

const quietMs = 4_000;

/**
 * @typedef {object} Progress
 * @property {<T>(title: string, work: (note: (remark: string) => void) => Promise<T>) => Promise<T>} step does the
 *   work and prints a line with its duration; meanwhile a terminal shows what the work notes
 * @property {(text: string) => void} say prints a line
 */

/**
 * Prints what a script is doing, one line a step. Nothing is printed for a step that took no noticeable time,
 * so a second start stays short. On a terminal the step under way shows at once, and its result takes its place.
 * @param {NodeJS.WriteStream} stream where to
 * @returns {Progress}
 */
export function createProgress(stream) {
  let pending = '';
  const clear = () => void (pending && stream.write('\r\x1b[2K'));
  const say = (/** @type {string} */ text) => {
    clear();
    stream.write(`${text}\n${pending}`);
  };
  const announce = (/** @type {string} */ title) => {
    if (stream.isTTY) {
      clear();
      pending = `… ${title}`;
      stream.write(pending);
    } else {
      say(`… ${title}`);
    }
  };
  return {
    say,
    async step(title, work) {
      const begin = performance.now();
      const slow = setTimeout(() => announce(title), stream.isTTY ? 100 : quietMs);
      let mark = '✗';
      try {
        const result = await work(
          (remark) => void (pending && announce(`${title}: ${remark}`.slice(0, (stream.columns ?? 80) - 4))),
        );
        mark = '✓';
        return result;
      } finally {
        clearTimeout(slow);
        clear();
        pending = '';
        const ms = performance.now() - begin;
        if (!isShuttingDown() && (ms > 50 || mark === '✗')) {
          say(`${mark} ${title} (${formatDuration(ms)})`);
        }
      }
    },
  };
}

/**
 * @param {number} ms
 * @returns {string} '0.3 s', '12 s', '3 min 05 s'
 */
export function formatDuration(ms) {
  const seconds = ms / 1000;
  if (seconds < 10) {
    return `${seconds.toFixed(1)} s`;
  }
  if (seconds < 60) {
    return `${Math.round(seconds)} s`;
  }
  const whole = Math.round(seconds);
  return `${Math.floor(whole / 60)} min ${String(whole % 60).padStart(2, '0')} s`;
}

/**
 * Runs a script: a failure it foresaw is told in its own words, everything started is stopped, and the exit
 * code is set.
 * @param {() => Promise<number | void>} main its exit code, 0 unless told
 * @param {(signal: string) => void} [announce] told once when a signal ends it
 * @param {() => void} [conclude] has the last word, after everything started has been stopped
 */
export async function runScript(main, announce, conclude) {
  stopOnSignals(announce);
  let code;
  try {
    code = (await main()) ?? 0;
  } catch (error) {
    const foreseen = error instanceof SetupError;
    process.stderr.write(`\n${foreseen ? error.message : stackText(error)}\n`);
    code = foreseen ? error.exitCode : 1;
  }
  await shutDown();
  conclude?.();
  process.exit(code);
}

/** @param {unknown} error */
function stackText(error) {
  return error instanceof Error && error.stack ? error.stack : errorText(error);
}
