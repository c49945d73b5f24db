import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { run } from './processes.mjs';
import { root } from './workspace.mjs';

const folder = join(root, 'tools/setup');

/**
 * Runs the tests of these scripts with Node's own runner; the scripts work before any package is installed, and so
 * do their tests.
 * @returns {Promise<import('./tally.mjs').Outcome>}
 */
export async function runScriptTests() {
  const files = readdirSync(folder).filter((name) => name.endsWith('.test.mjs'));
  const args = ['--test', '--test-reporter=tap', ...files.map((name) => join(folder, name))];
  const { code, output } = await run(process.execPath, args, { timeLimitMs: 5 * 60_000 });
  const count = (/** @type {string} */ word) =>
    Number(new RegExp(`^# ${word} (\\d+)$`, 'm').exec(output)?.[1] ?? 0);
  const failed = count('fail') + count('cancelled');
  const passed = count('pass');
  const isSilentFailure = failed === 0 && (code !== 0 || passed === 0);
  return { passed, failed: isSilentFailure ? 1 : failed, skipped: count('skipped') + count('todo'), output };
}
