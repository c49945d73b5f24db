import assert from 'node:assert/strict';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { after, test } from 'node:test';
import { run } from './processes.mjs';

const directory = mkdtempSync(join(tmpdir(), 'brakeven-lock-'));
after(() => rmSync(directory, { recursive: true, force: true }));

/**
 * Runs a script that holds the lock for a moment and writes down when it takes and leaves it.
 * @param {string} lock
 * @param {string} diary
 */
function holdInProcess(lock, diary) {
  const script = `
    import { appendFileSync } from 'node:fs';
    import { setTimeout as sleep } from 'node:timers/promises';
    import { withSetupLock } from '${new URL('./setup-lock.mjs', import.meta.url).href}';
    await withSetupLock(async () => {
      appendFileSync('${diary}', 'in\\n');
      await sleep(100);
      appendFileSync('${diary}', 'out\\n');
    }, () => undefined, '${lock}');`;
  return run(process.execPath, ['--input-type=module', '-e', script]);
}

test('lets one process at a time through', async () => {
  const lock = join(directory, 'a.lock');
  const diary = join(directory, 'a.diary');
  const results = await Promise.all([1, 2, 3, 4].map(() => holdInProcess(lock, diary)));
  assert.deepEqual(
    results.map(({ code }) => code),
    [0, 0, 0, 0],
  );
  assert.equal(readFileSync(diary, 'utf8'), 'in\nout\n'.repeat(4));
});

test('takes over the lock of a process that is gone, even when its number lives on in another', async () => {
  for (const content of ['999999999 1\n', `${process.pid} 1\n`, 'nonsense\n', '']) {
    const lock = join(directory, 'b.lock');
    const diary = join(directory, 'b.diary');
    writeFileSync(lock, content);
    writeFileSync(diary, '');
    const results = await Promise.all([1, 2].map(() => holdInProcess(lock, diary)));
    assert.deepEqual(
      results.map(({ code }) => code),
      [0, 0],
    );
    assert.equal(readFileSync(diary, 'utf8'), 'in\nout\n'.repeat(2), JSON.stringify(content));
  }
});
