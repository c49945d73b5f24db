import assert from 'node:assert/strict';
import { test } from 'node:test';
import { failingParts } from './build.mjs';
import { countTests } from './jest-suite.mjs';
import { Tally, asOneCheck } from './tally.mjs';

const good = {
  numPassedTests: 3,
  numFailedTests: 0,
  numPendingTests: 0,
  numTodoTests: 0,
  numRuntimeErrorTestSuites: 0,
};

function createTally() {
  /** @type {string[]} */
  const said = [];
  const tally = new Tally({
    say: (text) => void said.push(text),
    step: (_title, work) => work(() => undefined),
  });
  return { tally, said };
}

test('adds suites up, shows the failing ones in full and the passing ones in a line', async () => {
  const { tally, said } = createTally();
  await tally.run(
    'good',
    asOneCheck(async () => ({ code: 0, output: 'chatter' })),
  );
  await tally.run(
    'bad',
    asOneCheck(async () => ({ code: 2, output: 'the reason' })),
  );
  await tally.run('many', async () => ({ passed: 5, failed: 1, skipped: 2, output: 'more reasons' }));
  assert.equal(tally.summary(), '6 passed, 2 failed, 2 skipped');
  const text = said.join('\n');
  assert.match(text, /the reason\n✗ bad: 0 passed, 1 failed/);
  assert.match(text, /more reasons/);
  assert.doesNotMatch(text, /chatter/);
});

test('counts a suite that cannot be run as failed', async () => {
  const { tally } = createTally();
  await tally.run('broken', async () => {
    throw new Error('no database');
  });
  assert.equal(tally.summary(), '0 passed, 1 failed');
});

test('takes Jest at its report', () => {
  assert.deepEqual(countTests({ ...good, numPendingTests: 1, numTodoTests: 1 }, 0, ''), {
    passed: 3,
    failed: 0,
    skipped: 2,
    output: '',
  });
  assert.equal(countTests({ ...good, numFailedTests: 2, numRuntimeErrorTestSuites: 1 }, 1, '').failed, 3);
});

test('counts as failed a run without a report, without tests, or with a bad end', () => {
  assert.equal(countTests(null, 1, '').failed, 1);
  assert.equal(countTests({ ...good, numPassedTests: 0 }, 0, '').failed, 1);
  assert.equal(countTests(good, 1, '').failed, 1);
  assert.equal(countTests(good, 124, '').failed, 1);
});

test('shows the parts of a build that failed, and only those', () => {
  const output =
    '\n> nx run api:build\n\nwrong here\n\n> nx run web:build:production\n\nfine\n\nFailed tasks:\n\n- api:build\n';
  assert.match(failingParts(output), /wrong here/);
  assert.doesNotMatch(failingParts(output), /fine/);
  assert.equal(failingParts('Nx did not even begin'), 'Nx did not even begin');
});
